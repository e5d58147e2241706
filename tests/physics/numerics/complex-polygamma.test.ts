import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { digamma, trigamma } from '#server/physics/numerics/complex-polygamma.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { deviation, readReference, type Split } from './reference-table.ts';

interface Row {
  x: number;
  y: number;
  digamma: { re: Split; im: Split };
  trigamma: { re: Split; im: Split };
}
const { rows } = readReference<{ rows: Row[] }>('numerics/complex-polygamma.json');

describe('digamma and trigamma of complex argument', () => {
  it.each(rows)('x = $x, y = $y: both parts within their errors of 30 digits', (row) => {
    for (const [f, name] of [
      [digamma, 'digamma'],
      [trigamma, 'trigamma'],
    ] as const) {
      const { re, im, reError, imError } = f(row.x, row.y);
      expect(deviation(re, row[name].re), name).toBeLessThanOrEqual(reError);
      expect(deviation(im, row[name].im), name).toBeLessThanOrEqual(imError);
      expect(imError).toBeLessThanOrEqual(4e-15 * Math.abs(row[name].im.high));
    }
  });

  it("psi(1) = -0.5772156649, psi(1/2) = -1.9635100260, psi'(1) = 1.6449340668 (Abramowitz and Stegun, 6.3.2, 6.3.3, 6.4.2)", () => {
    expectRelative(digamma(1, 0).re, -0.5772156649, 1e-10);
    expectRelative(digamma(0.5, 0).re, -1.963510026, 1e-10);
    expectRelative(trigamma(1, 0).re, 1.6449340668, 1e-10);
    expectRelative(trigamma(0.5, 0).re, Math.PI ** 2 / 2, 4e-15);
  });

  it('hold their recurrence, are conjugate at the conjugate, and meet the reflection on the line 1 + iy', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 40, noNaN: true }),
        fc.double({ min: -40, max: 40, noNaN: true }),
        (x, y) => {
          const size = x * x + y * y;
          const here = digamma(x, y);
          const next = digamma(x + 1, y);
          expect(Math.abs(next.re - here.re - x / size)).toBeLessThan(
            here.reError + next.reError + 1e-15 * Math.abs(x / size),
          );
          expect(digamma(x, -y).im + here.im).toBe(0);
          expect(trigamma(x, -y).im + trigamma(x, y).im).toBe(0);
        },
      ),
      { numRuns: 300 },
    );
    // Im psi(1 + iy) = -1/(2y) + π/2 coth πy; Re psi'(1 + iy) = 1/(2y²) - π²/(2 sinh² πy).
    for (const y of [0.3, 1, 3]) {
      const sinh = Math.sinh(Math.PI * y);
      expectRelative(digamma(1, y).im, -1 / (2 * y) + Math.PI / 2 / Math.tanh(Math.PI * y), 1e-14);
      expectRelative(trigamma(1, y).re, 1 / (2 * y * y) - Math.PI ** 2 / (2 * sinh * sinh), 3e-14);
    }
  });

  it.each([0, -1, NaN, Infinity])('refuses Re z = %d', (x) => {
    expect(() => digamma(x, 1)).toThrow(RangeError);
    expect(() => trigamma(x, 1)).toThrow(RangeError);
  });
});
