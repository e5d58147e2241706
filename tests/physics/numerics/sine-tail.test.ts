import { describe, expect, it } from 'vitest';
import { integratePanels } from '#server/physics/numerics/panel-quadrature.ts';
import { sineTail } from '#server/physics/numerics/sine-tail.ts';

describe('oscillating tail of a sine transform', () => {
  /** 1/r³ for complex r. */
  const cube = (re: number, im: number) => {
    const size = Math.hypot(re, im) ** 3;
    const angle = -3 * Math.atan2(im, re);
    return [Math.cos(angle) / size, Math.sin(angle) / size] as const;
  };

  it.each([0.01, 0.3, 2, 40])('q = %d: parts on the real axis add up to it', (q) => {
    const from = (R: number) => sineTail(cube, R, q);
    const width = (16 * Math.PI) / q;
    const between = integratePanels((r) => Math.sin(q * r) / q / r ** 3, 1, 30, width, {
      breakpoints: [2, 4, 8, 16],
    });
    const [near, far] = [from(1), from(30)];
    const apart = Math.abs(near.value - far.value - between.value);
    expect(apart).toBeLessThanOrEqual(near.error + far.error + between.error);
    expect(near.error).toBeLessThan(1e-14 / q ** 2);
    expect(near.status).toBe('converged');
  });

  it('meets e^{-q} = ∫ sin(qr) 2r/(π(1 + r²)) dr (Gradshteyn and Ryzhik 3.723.3)', () => {
    const shape = (re: number, im: number) => {
      const [a, b] = [1 + re * re - im * im, 2 * re * im];
      const size = a * a + b * b;
      return [(re * a + im * b) / size, (im * a - re * b) / size] as const;
    };
    for (const q of [0.2, 1, 5]) {
      const R = Math.PI / q;
      const inner = integratePanels((r) => (shape(r, 0)[0] * Math.sin(q * r)) / q, 0, R, Infinity, {
        breakpoints: [1, 2, 4, 8],
      });
      const outer = sineTail(shape, R, q);
      const exact = ((Math.PI / 2) * Math.exp(-q)) / q;
      expect(Math.abs(inner.value + outer.value - exact)).toBeLessThanOrEqual(
        inner.error + outer.error + 1e-15 * exact,
      );
    }
  });
});
