import { describe, expect, it } from 'vitest';
import { sineTransform } from '#server/physics/numerics/oscillatory-quadrature.ts';
import { integratePanels } from '#server/physics/numerics/panel-quadrature.ts';
import { integrate } from '#server/physics/numerics/quadrature.ts';

const eightPeriods = (q: number) => (16 * Math.PI) / q;

describe('panel quadrature', () => {
  it.each([3, 100, 2000, 30_000])('damped sine of wave number %d within its error', (q) => {
    const f = (x: number) => Math.exp(-x) * Math.sin(q * x);
    const result = integratePanels(f, 0, 48, eightPeriods(q), { breakpoints: [6, 18] });
    const exact = q / (1 + q * q);
    expect(result.status).toBe('converged');
    expect(Math.abs(result.value - exact)).toBeLessThanOrEqual(result.error);
    // The phase is blurred by u q x: the bound follows it and no more.
    expect(result.error).toBeLessThanOrEqual(3e-15 + 6e-16 * q);
    expect(result.evaluations).toBeLessThanOrEqual(128 * ((q * 48) / (16 * Math.PI) + 6));
  });

  it('agrees with the adaptive integral', () => {
    const f = (x: number) => Math.cos(40 * x * x);
    const panels = integratePanels(f, 0, 3, 0.05);
    const adaptive = integrate(f, 0, 3, { absolute: 1e-13 });
    expect(Math.abs(panels.value - adaptive.value)).toBeLessThanOrEqual(
      panels.error + adaptive.error,
    );
    expect(panels.error + adaptive.error).toBeLessThan(2e-12);
  });

  it('cuts panels that were chosen too wide until the orders agree', () => {
    const exact = 2000 / (1 + 2000 ** 2);
    const f = (x: number) => Math.exp(-x) * Math.sin(2000 * x);
    const result = integratePanels(f, 0, 48, 1);
    expect(Math.abs(result.value - exact)).toBeLessThanOrEqual(result.error);
  });

  it('fails rather than work without end, and refuses widths that are none', () => {
    const result = integratePanels(Math.sin, 0, 1, 1e-9);
    expect(result).toMatchObject({ status: 'failed', value: NaN, error: Infinity, evaluations: 0 });
    expect(integratePanels(() => NaN, 0, 1, 1)).toMatchObject({ status: 'failed', value: NaN });
    for (const width of [0, -1, NaN]) {
      expect(() => integratePanels(Math.sin, 0, 1, width)).toThrow(RangeError);
    }
    expect(() => integratePanels(Math.sin, 0, Infinity, 1)).toThrow(RangeError);
    expect(integratePanels(Math.sin, 1, 1, 1).value).toBe(0);
  });
});

describe('sine transform', () => {
  const input = { integrand: (r: number) => Math.exp(-r), edges: [0, 6, 18, 48], tail: 1e-17 };

  it('meets a^2/(1 + q²a²), continuously through q = 0', () => {
    for (const q of [0, 1e-200, 1e-9, 1e-3, 1, 30, 2000]) {
      const { value, error, status } = sineTransform(input, q);
      expect(status).toBe('converged');
      expect(Math.abs(value - 1 / (1 + q * q))).toBeLessThanOrEqual(error);
      expect(error).toBeLessThan(5e-15);
    }
  });

  it('fails honestly beyond its reach and refuses what is no wave number', () => {
    expect(sineTransform(input, 1e7)).toMatchObject({ status: 'failed', value: NaN });
    for (const q of [-1, NaN, Infinity]) expect(() => sineTransform(input, q)).toThrow(RangeError);
  });
});
