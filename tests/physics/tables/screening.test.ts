import { describe, expect, it } from 'vitest';
import { BOHR } from '#server/physics/constants/codata2022.ts';
import {
  SCREENINGS,
  THOMAS_FERMI_PREFACTOR,
  ionAtomLength,
  screening,
  thomasFermiLength,
} from '#server/physics/tables/screening.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { refusal } from './refusal.ts';

const sum = (numbers: readonly number[]) => numbers.reduce((total, value) => total + value, 0);

describe('screening coefficients', () => {
  it('are those printed', () => {
    // Molière 1947.
    expect(screening('moliere')).toMatchObject({
      weights: [0.35, 0.55, 0.1],
      decays: [0.3, 1.2, 6],
    });
    // Ziegler, Biersack and Littmark 1985.
    expect(screening('universalIon')).toMatchObject({
      weights: [0.1818, 0.5099, 0.2802, 0.02817],
      decays: [3.2, 0.9423, 0.4029, 0.2016],
    });
    // Wilson, Haggmark and Biersack 1977, from memory; the sum to six digits checks the weights.
    expect(screening('krc').decays).toEqual([0.278544, 0.637174, 1.919249]);
  });

  it('add up to 1 but for the residual that is stated: 7e-5 of the universal function', () => {
    for (const { weights, decays, residual } of SCREENINGS) {
      expect(Math.abs(sum(weights) - 1 - residual)).toBeLessThan(1e-15);
      expect(decays).toHaveLength(weights.length);
    }
    expect(screening('moliere').residual).toBe(0);
    expect(screening('krc').residual).toBe(0);
    expect(screening('universalIon').residual).toBe(7e-5);
  });

  it('lie near the Thomas-Fermi function, tabulated at x = 1 and 5 as 0.42401 and 0.07881', () => {
    // Values of the Thomas-Fermi function from memory; Molière fits them within a few thousandths (Z. Naturforsch. 2a (1947) 133).
    const value = (x: number) => {
      const { weights, decays } = screening('moliere');
      return sum(weights.map((weight, index) => weight * Math.exp(-(decays[index] ?? NaN) * x)));
    };
    expect(Math.abs(value(1) - 0.42401)).toBeLessThan(2e-3);
    expect(Math.abs(value(5) - 0.07881)).toBeLessThan(2e-3);
  });
});

describe('screening lengths', () => {
  it('have the Thomas-Fermi prefactor (9π²/128)^(1/3)', () => {
    expectRelative(THOMAS_FERMI_PREFACTOR, 0.885341377, 1e-9);
    for (const { prefactor } of SCREENINGS) expectRelative(prefactor, THOMAS_FERMI_PREFACTOR, 7e-5);
  });

  it('are those of the check values, angstrom', () => {
    expectRelative(thomasFermiLength(79), 0.1091865, 2e-6);
    expectRelative(thomasFermiLength(6), 0.2578265, 2e-6);
    expectRelative(ionAtomLength('universalIon', 2, 79), 0.1199932, 1e-6);
  });

  it('give the forward electron amplitudes of Molière atoms: 2Z/a0 Σ w (a/d)²', () => {
    const forward = (z: number) => {
      const { weights, decays } = screening('moliere');
      const a = thomasFermiLength(z);
      const terms = weights.map((weight, index) => weight * (a / (decays[index] ?? NaN)) ** 2);
      return (2 * z * sum(terms)) / BOHR;
    };
    // C 6.4422, Al 8.3361, Au 15.2121 angstrom.
    expectRelative(forward(6), 6.4422, 1e-5);
    expectRelative(forward(13), 8.3361, 1e-5);
    expectRelative(forward(79), 15.2121, 1e-5);
  });

  it('are symmetric in ion and atom, and fall with either charge', () => {
    for (const key of ['krc', 'universalIon'] as const) {
      expect(ionAtomLength(key, 2, 79)).toBe(ionAtomLength(key, 79, 2));
      expect(ionAtomLength(key, 3, 79)).toBeLessThan(ionAtomLength(key, 2, 79));
    }
    // Two equal charges: (2√Z)^(-2/3) = 4^(-1/3) Z^(-1/3).
    const ratio = ionAtomLength('krc', 36, 36) / thomasFermiLength(36);
    expectRelative(ratio, (4 ** (-1 / 3) * 0.8853) / 0.88534, 1e-12);
  });
});

describe('refusals', () => {
  it('name what is known and the range', () => {
    expect(refusal(() => screening('lenz'))).toContain('moliere, krc, universalIon');
    expect(refusal(() => screening('__proto__'))).toContain('known');
    for (const bad of [0, -1, 201, NaN]) {
      expect(refusal(() => thomasFermiLength(bad))).toContain('`Z` is an atomic number');
      expect(refusal(() => ionAtomLength('krc', 1, bad))).toContain('`Z2`');
      expect(refusal(() => ionAtomLength('universalIon', bad, 1))).toContain('`Z1`');
    }
  });
});
