import { describe, expect, test } from 'vitest';
import { besselK0, besselK1 } from '#server/physics/numerics/modified-bessel.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { deviation, readReference, type Split } from './reference-table.ts';

interface Row {
  x: number;
  k0: Split;
  k1: Split;
}
const ROWS = readReference<{ modifiedBessel: Row[] }>('methods/eikonal.json').modifiedBessel;

describe('K0 and K1', () => {
  test.each(ROWS)('against mpmath at x = $x: the error bounds the deviation', ({ x, k0, k1 }) => {
    for (const [found, expected] of [
      [besselK0(x), k0],
      [besselK1(x), k1],
    ] as const) {
      expect(deviation(found.value, expected)).toBeLessThanOrEqual(found.error);
      expect(found.error).toBeLessThan((1e-14 + 4e-16 * x) * expected.high + 2 ** -1021);
    }
  });

  test('published values (needs.md D 52)', () => {
    expectRelative(besselK0(1).value, 0.4210244382, 2e-10);
    expectRelative(besselK1(1).value, 0.6019072302, 2e-10);
  });

  test('K0 = -K1 by differences, and the limit 1/x of K1', () => {
    const h = 1e-5;
    expectRelative(
      (besselK0(2 - h).value - besselK0(2 + h).value) / (2 * h),
      besselK1(2).value,
      1e-8,
    );
    expectRelative(besselK1(1e-9).value, 1e9, 1e-14);
  });

  test('beyond what a double holds nothing is left; below zero it is refused', () => {
    expect(besselK0(2000).value).toBe(0);
    expect(() => besselK0(0)).toThrow(RangeError);
    expect(() => besselK1(-1)).toThrow(RangeError);
    expect(() => besselK1(NaN)).toThrow(RangeError);
  });
});
