import { describe, expect, it } from 'vitest';
import { logGamma } from '#server/physics/numerics/complex-log-gamma.ts';
import { coulombPhases } from '#server/physics/numerics/coulomb-phase.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

describe('logarithm of the gamma function', () => {
  it('is that of factorials, of Γ(1/4) = 3.6256099082 and of Γ(1/2) on the real line', () => {
    expectRelative(logGamma(11, 0).re, Math.log(3628800), 4e-15);
    expectRelative(Math.exp(logGamma(0.25, 0).re), 3.6256099082, 2e-11);
    expectRelative(logGamma(0.5, 0).re, Math.log(Math.PI) / 2, 2e-14);
    expect(logGamma(3, 0).im).toBe(0);
  });

  it.each([1e-3, 0.3, 2, 17.9, 18.1, 150])(
    'meets the reflection |Γ(1 + iy)|² = πy/sinh πy at y = %d',
    (y) => {
      // ln(sinh x) = x + ln(1 - exp(-2x)) - ln 2
      const x = Math.PI * y;
      const exact = (Math.log(x) - x - Math.log(-Math.expm1(-2 * x)) + Math.LN2) / 2;
      const { re, reError } = logGamma(1, y);
      expect(Math.abs(re - exact)).toBeLessThan(reError + 4e-16 * (x + 1));
      expect(reError).toBeLessThan(1e-13 + 1e-14 * x);
    },
  );

  it.each([0, -1, NaN, Infinity])('refuses Re z = %d', (x) => {
    expect(() => logGamma(x, 1)).toThrow(RangeError);
  });
});

describe('Coulomb phases', () => {
  it('sigma_0(1) = -0.3016403205, sigma_0(5) = 3.8158985746 (Abramowitz and Stegun, chapter 14)', () => {
    expectRelative(coulombPhases(0, 1).sigma[0] ?? NaN, -0.3016403205, 2e-10);
    expectRelative(coulombPhases(0, 5).sigma[0] ?? NaN, 3.8158985746, 2e-11);
  });

  it.each([-300, -4.5, -1e-3, 0, 0.2, 21.3, 300])(
    'are arg Γ(l + 1 + i eta) for every l at eta = %d, and odd in eta',
    (eta) => {
      const { sigma, error } = coulombPhases(200, eta);
      const mirrored = coulombPhases(200, -eta).sigma;
      for (const l of [0, 1, 9, 40, 200]) {
        const { im, imError } = logGamma(l + 1, eta);
        expect(Math.abs((sigma[l] ?? NaN) - im)).toBeLessThanOrEqual((error[l] ?? 0) + imError);
        expect((sigma[l] ?? NaN) + (mirrored[l] ?? NaN)).toBe(0);
      }
      expect(error[200] ?? NaN).toBeLessThan(1e-14 + 3e-14 * Math.abs(eta));
    },
  );

  it('refuse what is no order and no number', () => {
    expect(() => coulombPhases(-1, 1)).toThrow(RangeError);
    expect(() => coulombPhases(2, NaN)).toThrow(RangeError);
  });
});
