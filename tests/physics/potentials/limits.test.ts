import { describe, expect, it } from 'vitest';
import { FINE_STRUCTURE, HBAR_C_EV_ANGSTROM } from '#server/physics/constants/codata2022.ts';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { build, transform, unitTerm } from './build-term.ts';

const at = (form: string, lengths: Record<string, number>, q: number) =>
  transform(unitTerm(form, lengths), 'closed', q).value;
const Q = [0, 1e-3, 0.3, 2, 17];

describe('limits and kinships of the transforms', () => {
  it('q -> 0: one third of R cubed, and so on', () => {
    expectRelative(at('yukawa', { a: 2 }, 0), 8, 1e-15);
    expectRelative(at('screenedCoulomb', { a: 2 }, 0), 4, 1e-15);
    expectRelative(at('squareWell', { R: 2 }, 0), 8 / 3, 1e-15);
    expectRelative(at('gaussian', { a: 2 }, 0), 2 * Math.sqrt(Math.PI), 1e-15);
    expectRelative(at('exponential', { a: 2 }, 0), 16, 1e-15);
    expectRelative(at('deltaShell', { R: 2 }, 0), 4, 1e-15);
    // R³/3 (1 + π²a²/R²), the rest e^{-R/a}
    expectRelative(at('woodsSaxon', { R: 6, a: 0.1 }, 0), 72 * (1 + (Math.PI / 60) ** 2), 1e-15);
  });

  it('woodsSaxon -> squareWell as a -> 0, with the square of a', () => {
    const gap = (a: number, q: number) =>
      at('woodsSaxon', { R: 1, a }, q) - at('squareWell', { R: 1 }, q);
    for (const q of Q) {
      expect(Math.abs(gap(1e-7, q))).toBeLessThan(1e-11);
      expectRelative(gap(1e-4, q) / gap(1e-3, q), 1e-2, 1e-3);
    }
  });

  it('screenedCoulomb -> coulomb as a -> infinity, with the square of 1/(qa)', () => {
    const coulomb = build('coulomb', { chargeProduct: 1 });
    for (const q of [1e-3, 0.3, 2, 17]) {
      const bare = transform(coulomb, 'closed', q).value;
      expectRelative(at('screenedCoulomb', { a: 1e10 }, q), bare, 1e-13);
      expectRelative(1 - at('screenedCoulomb', { a: 100 / q }, q) / bare, 1 / 10001, 1e-10);
    }
  });

  it('yukawa with V0 a = Z1 Z2 alpha hbar c is screenedCoulomb', () => {
    const a = 0.7;
    const V0 = (-79 * FINE_STRUCTURE * HBAR_C_EV_ANGSTROM) / a;
    const yukawa = build('yukawa', { V0, a });
    const screened = build('screenedCoulomb', { chargeProduct: -79, a });
    for (const q of Q) {
      const one = yukawa.strength.re * transform(yukawa, 'closed', q).value;
      const other = screened.strength.re * transform(screened, 'closed', q).value;
      expectRelative(one, other, 2e-15);
    }
    const r = 0.31;
    const [v1, v2] = [yukawa.v?.(r) ?? NaN, screened.v?.(r) ?? NaN];
    expectRelative(yukawa.strength.re * v1, screened.strength.re * v2, 2e-15);
  });

  it('squareWell is a stack of deltaShells, woodsSaxon one of squareWells', () => {
    for (const q of [0.3, 2, 17]) {
      const shells = integrate((R) => at('deltaShell', { R }, q), 1e-9, 1, { absolute: 1e-13 });
      expect(Math.abs(shells.value - at('squareWell', { R: 1 }, q))).toBeLessThan(1e-12);
      const a = 0.1;
      const weight = (R: number) => 1 / (4 * a * Math.cosh((R - 1) / (2 * a)) ** 2);
      const wells = integrate((R) => weight(R) * at('squareWell', { R }, q), 1e-9, 5, {
        breakpoints: [0.5, 1, 1.5, 2.5],
        absolute: 1e-14,
      });
      expect(Math.abs(wells.value - at('woodsSaxon', { R: 1, a }, q))).toBeLessThan(1e-12);
    }
  });

  it('woodsSaxon with R = 0 is an alternating sum of exponentials', () => {
    // 1/(1 + e^r) = e^{-r} - e^{-2r} + …
    const q = 0.8;
    const terms = Array.from({ length: 4000 }, (_, i) => i + 1).map((n) => {
      const term = at('exponential', { a: 1 / n }, q);
      return n % 2 === 1 ? term : -term;
    });
    const paired = terms.slice(0, -1).map((term, i) => (term + (terms[i + 1] ?? 0)) / 2);
    const sum = (terms[0] ?? 0) / 2 + paired.reduce((total, term) => total + term, 0);
    expectRelative(at('woodsSaxon', { R: 0, a: 1 }, q), sum, 1e-12);
  });

  it('coulomb: infinite forward, and nothing at all without charge', () => {
    const charged = build('coulomb', { chargeProduct: -79 });
    expect(transform(charged, 'closed', 0)).toMatchObject({ value: Infinity, status: 'converged' });
    expect(charged.coulombTail).toBe(1);
    expect(transform(charged, 'quadrature', 2).value).toBe(0.25);
    for (const values of [{ chargeProduct: 0 }, {}]) {
      const neutral = build('coulomb', values, {
        twoMuOverHbar2: 1,
        projectileCharge: 0,
        targetCharge: 79,
      });
      expect(transform(neutral, 'closed', 0).value).toBe(0);
      expect(neutral.coulombTail).toBe(0);
    }
  });
});
