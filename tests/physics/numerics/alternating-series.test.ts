import { describe, expect, it } from 'vitest';
import { alternatingLorentzSum } from '#server/physics/numerics/alternating-series.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

/** Apéry's constant, OEIS A002117; eta(3) is three quarters of it. */
const ZETA3 = 1.2020569031595942;

describe('alternating sum of n e^{-n rho}/(n² + y²)²', () => {
  it('is eta(3) for rho = 0 and y = 0', () => {
    const { value, error } = alternatingLorentzSum(0)(0);
    expect(Math.abs(value - 0.75 * ZETA3)).toBeLessThanOrEqual(error);
    expect(error).toBeLessThan(3e-15);
  });

  it('is one over 4 y⁴ far out for rho = 0, where its terms are y times as large', () => {
    const sum = alternatingLorentzSum(0);
    for (const y of [1e4, 1e6]) {
      const { value, error } = sum(y);
      // g'(0)/4, then -g'''(0)/48 with g = n/(n²+y²)²
      expectRelative(value, (1 + 1 / y ** 2) / (4 * y ** 4), 5e-15);
      expect(error).toBeLessThan(100 * 2 ** -53 * value);
    }
  });

  it('agrees with the plain sum where that converges', () => {
    for (const rho of [0.2, 0.6, 0.999, 1, 1.5, 9]) {
      for (const y of [0, 0.4, 3, 25]) {
        let plain = 0;
        for (let n = Math.ceil(60 / rho); n > 0; n--) {
          plain += ((n % 2 === 1 ? 1 : -1) * n * Math.exp(-n * rho)) / (n * n + y * y) ** 2;
        }
        const { value, error } = alternatingLorentzSum(rho)(y);
        // The plain sum cancels by up to y² or 4/rho².
        expect(Math.abs(value - plain)).toBeLessThanOrEqual(error + 1e-15 * plain * (y * y + 10));
        expect(error).toBeLessThan(1e-14 * value);
      }
    }
  });

  it('joins its two routes at rho = 1 and vanishes for a thick sphere', () => {
    const below = alternatingLorentzSum(1 - 1e-15)(0.7);
    const above = alternatingLorentzSum(1)(0.7);
    expectRelative(below.value, above.value, 1e-14);
    expect(alternatingLorentzSum(1e6)(1).value).toBe(0);
  });

  it('refuses a growing series', () => {
    for (const rho of [-1, NaN]) expect(() => alternatingLorentzSum(rho)).toThrow(RangeError);
  });
});
