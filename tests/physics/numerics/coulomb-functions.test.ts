import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { coulombWaves, type CoulombWaves } from '#server/physics/numerics/coulomb-functions.ts';
import { sphericalBesselArray } from '#server/physics/numerics/spherical-bessel.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const at = (values: Float64Array, l: number) => values[l] ?? NaN;

/** F'G - FG' of the scaled functions: the scales cancel. */
function wronskian(waves: CoulombWaves, l: number): number {
  return at(waves.df, l) * at(waves.g, l) - at(waves.f, l) * at(waves.dg, l);
}

describe('Coulomb functions', () => {
  it('have the values of Abramowitz and Stegun, chapter 14, at eta = 1', () => {
    const near = coulombWaves(0, 1, 1);
    expectRelative(at(near.f, 0), 0.2275262105, 3e-10);
    expectRelative(at(near.g, 0), 2.0430971621, 1e-10);
    const far = coulombWaves(0, 1, 5);
    expectRelative(at(far.f, 0), 0.684937412, 1e-10);
    expectRelative(at(far.g, 0), -0.8984143591, 1e-10);
  });

  it.each([0.01, 0.7, 3, 25, 300])(
    'without a charge are Riccati-Bessel functions at rho = %d',
    (rho) => {
      const waves = coulombWaves(40, 0, rho);
      const bessel = sphericalBesselArray(40, rho);
      const envelope = (l: number) => Math.hypot(at(waves.f, l), at(waves.g, l));
      for (const l of [0, 1, 2, 7, 20, 40]) {
        const size = l * (l + 1) > rho * rho ? Math.abs(at(waves.f, l)) : envelope(l);
        const unscaled = at(waves.f, l) * 2 ** -(waves.scale[l] ?? 0);
        const own = size * 2 ** -(waves.scale[l] ?? 0);
        expect(Math.abs(unscaled - rho * at(bessel, l))).toBeLessThan(3e-13 * own);
      }
      expect(Math.abs(at(waves.g, 0) - Math.cos(rho))).toBeLessThan(at(waves.error, 0));
      expect(Math.abs(at(waves.dg, 0) + Math.sin(rho))).toBeLessThan(at(waves.error, 0));
    },
  );

  it('keep their Wronskian at every order, F having come down and G gone up', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -300, max: 300, noNaN: true }),
        fc.double({ min: -3, max: 3, noNaN: true }),
        fc.integer({ min: 0, max: 150 }),
        (eta, power, lMax) => {
          const waves = coulombWaves(lMax, eta, 10 ** power);
          for (let l = 0; l <= lMax; l++) {
            const size =
              Math.hypot(at(waves.f, l), at(waves.g, l)) *
              Math.hypot(at(waves.df, l), at(waves.dg, l));
            const behind = l * (l + 1) + 2 * eta * 10 ** power > 10 ** (2 * power);
            const allowed = 4 * at(waves.error, l) * (behind ? 1 : size);
            expect(Math.abs(wronskian(waves, l) - 1)).toBeLessThan(allowed);
          }
        },
      ),
      { numRuns: 150 },
    );
  });

  it('do not depend on how many orders are asked for', () => {
    const few = coulombWaves(3, -7.5, 12);
    const many = coulombWaves(90, -7.5, 12);
    for (let l = 0; l <= 3; l++) {
      const allowed = at(few.error, l) * Math.hypot(at(few.f, l), at(few.g, l));
      expect(Math.abs(at(many.f, l) - at(few.f, l))).toBeLessThan(allowed);
      expect(Math.abs(at(many.g, l) - at(few.g, l))).toBeLessThan(allowed);
    }
  });

  it.each([
    [-1, 1, 1],
    [1.5, 1, 1],
    [0, NaN, 1],
    [0, 1, 0],
    [0, 1, -1],
    [0, 1, NaN],
    [0, 1, Infinity],
  ])('refuse l = %d, eta = %d, rho = %d', (l, eta, rho) => {
    expect(() => coulombWaves(l, eta, rho)).toThrow(RangeError);
  });
});
