import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  cubicSpline,
  linearSpline,
  pieceAt,
  pieceValue,
} from '#server/physics/numerics/cubic-spline.ts';
import { integratePanels } from '#server/physics/numerics/panel-quadrature.ts';
import { polynomialSine } from '#server/physics/numerics/polynomial-sine.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const steps = fc.array(fc.double({ min: 0.05, max: 2, noNaN: true }), {
  minLength: 4,
  maxLength: 30,
});
const ascending = (widths: readonly number[]) =>
  widths.reduce<number[]>((x, width) => [...x, (x.at(-1) ?? 0) + width], [0.3]);

describe('cubic spline', () => {
  const at = (x: number[], y: number[], where: number) => {
    const pieces = cubicSpline(x, y);
    const piece = pieces[pieceAt(pieces, where)];
    return piece ? pieceValue(piece, where) : NaN;
  };

  it('reproduces any cubic, between and beyond the points', () => {
    const cubic = (t: number) => 2 - t + 0.5 * t ** 2 - 0.3 * t ** 3;
    fc.assert(
      fc.property(steps, fc.double({ min: 0, max: 1, noNaN: true }), (widths, share) => {
        const x = ascending(widths);
        const where = 0.3 + share * ((x.at(-1) ?? 1) - 0.3);
        const size = Math.max(...x.map((t) => Math.abs(cubic(t)))) + 10;
        const apart = Math.abs(at(x, x.map(cubic), where) - cubic(where));
        expect(apart).toBeLessThan(1e-11 * size);
      }),
    );
  });

  it('passes through its points with two continuous derivatives, and a third where no knot is', () => {
    fc.assert(
      fc.property(
        steps,
        fc.array(fc.double({ min: -9, max: 9, noNaN: true }), { minLength: 31, maxLength: 31 }),
        (widths, y) => {
          const x = ascending(widths);
          const values = x.map((_, i) => y[i] ?? 0);
          const pieces = cubicSpline(x, values);
          const size = pieces.reduce(
            (most, { width, c }) => Math.max(most, ...c.map((k, i) => Math.abs(k) * width ** i)),
            9,
          );
          pieces.slice(1).forEach(({ start, c }, i) => {
            const before = pieces[i];
            if (!before) throw new Error('a piece is missing');
            const h = before.width;
            const [, c1, c2, c3] = before.c;
            const shortest = Math.min(...pieces.map(({ width }) => width));
            const close = (a: number, b: number, order: number) =>
              expect(Math.abs(a - b)).toBeLessThan((1e-11 * size) / shortest ** order);
            close(pieceValue(before, start), c[0], 0);
            close(c1 + 2 * c2 * h + 3 * c3 * h * h, c[1], 1);
            close(c2 + 3 * c3 * h, c[2], 2);
            if (i === 0 || i === pieces.length - 2) close(c3, c[3], 3);
          });
        },
      ),
      { numRuns: 60 },
    );
  });

  it('comes closer with the fourth power of the step', () => {
    const error = (n: number) => {
      const x = Array.from({ length: n + 1 }, (_, i) => (2 * i) / n);
      return Math.abs(at(x, x.map(Math.sin), 1.01) - Math.sin(1.01));
    };
    expect(error(64) / error(128)).toBeGreaterThan(10);
  });

  it('finds the piece of a point, and joins points by lines', () => {
    const pieces = linearSpline([0, 1, 3], [2, 4, 0]);
    expect([-1, 0, 0.5, 1, 2.9, 3, 9].map((x) => pieceAt(pieces, x))).toEqual([
      0, 0, 0, 1, 1, 1, 1,
    ]);
    expect(pieces.map((piece, i) => pieceValue(piece, i + 0.5))).toEqual([3, 3]);
  });

  it('refuses too few points and points that do not ascend', () => {
    expect(() => cubicSpline([0, 1, 2], [1, 2, 3])).toThrow(/at least four/);
    expect(() => cubicSpline([0, 1, 1, 2], [1, 2, 3, 4])).toThrow(/ascend/);
    expect(() => cubicSpline([0, 1, NaN, 2], [1, 2, 3, 4])).toThrow(/ascend/);
  });
});

describe('sine transform of polynomials', () => {
  const piece = { start: 1.7, width: 0.8, scaled: [0.4, -1, 2, 0.3, -0.7] as const };
  const polynomial = (x: number) => {
    const t = (x - 1.7) / 0.8;
    return (0.4 - t + 2 * t ** 2 + 0.3 * t ** 3 - 0.7 * t ** 4) / 0.8;
  };

  it.each([1e-200, 1e-9, 1e-3, 0.3, 1, 2.4, 3.74, 3.76, 9, 80, 2000])(
    'q = %d: the quadrature of it',
    (q) => {
      const direct = integratePanels(
        (x) => (polynomial(x) * Math.sin(q * x)) / q,
        1.7,
        2.5,
        (16 * Math.PI) / q,
      );
      const { value, rounding } = polynomialSine([piece], q);
      // The phase q x is rounded: 2 u of it.
      const phase = (4e-16 * q * 2.5) / q;
      expect(Math.abs(value - direct.value)).toBeLessThanOrEqual(rounding + direct.error + phase);
      expect(rounding).toBeLessThan(2e-14 * Math.min(2.5, 1 / q));
    },
  );

  it('is the first moment at small q, to all digits', () => {
    const moment = integratePanels((x) => x * polynomial(x), 1.7, 2.5, Infinity).value;
    for (const q of [1e-8, 1e-30, 1e-300])
      expectRelative(polynomialSine([piece], q).value, moment, 2e-15);
  });
});
