import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { FINE_STRUCTURE } from '#server/physics/constants/codata2022.ts';
import { twoBody } from '#server/physics/kinematics/two-body.ts';
import {
  exchangeDcs,
  exchangeSpin,
  exchangeWeight,
  identicalByRule,
} from '#server/physics/methods/exchange.ts';
import { nuclearMassEnergy, nuclide } from '#server/physics/tables/nuclides.ts';
import { species } from '#server/physics/tables/species.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const DEG = Math.PI / 180;
const exact = (re: number, im: number) => ({ re, im, error: 0 });

/** Rutherford's amplitude with its logarithmic phase, up to a phase common to theta and pi - theta. */
function coulomb(theta: number, eta: number, k: number) {
  const sin2 = Math.sin(theta / 2) ** 2;
  const size = -eta / (2 * k * sin2);
  const phase = -eta * Math.log(sin2);
  return exact(size * Math.cos(phase), size * Math.sin(phase));
}

function mott(particle: { mass: number; charge: number; spin: number }, energyCm: number) {
  const { mass, charge, spin } = particle;
  const { k, relativeVelocity } = twoBody({
    projectileMass: mass,
    targetMass: mass,
    energy: 2 * energyCm,
    regime: 'nonrelativistic',
  });
  const eta = (charge ** 2 * FINE_STRUCTURE) / relativeVelocity;
  const dcs = (theta: number) =>
    exchangeDcs(coulomb(theta, eta, k), coulomb(Math.PI - theta, eta, k), spin).value * 1e8;
  return { eta, k, dcs };
}

const carbon = nuclide('C-12');
const CARBON = { mass: nuclearMassEnergy(carbon), charge: 6, spin: carbon.spin ?? NaN };

describe('identical particles', () => {
  // Check value 34, analytic.
  it.each([
    [0, 4, 2],
    [0.5, 1, 0.5],
    [1, 8 / 3, 4 / 3],
    [3, 16 / 7, 8 / 7],
    [1.5, 1.5, 0.75],
  ])(
    'spin %d at 90 degrees: %d times one amplitude squared, %d times the incoherent sum',
    (spin, single, incoherent) => {
      const f = exact(0.3, -1.1);
      const one = f.re ** 2 + f.im ** 2;
      expectRelative(exchangeDcs(f, f, spin).value, single * one, 1e-15);
      expectRelative(exchangeDcs(f, f, spin).value, incoherent * 2 * one, 1e-15);
      expectRelative(single, 2 + exchangeWeight(spin), 1e-15);
    },
  );

  // Check values 35 to 37: Mott (1930) with the Coulomb phase, barn/sr.
  it.each([
    [
      'alpha + alpha, 1 MeV',
      species('alpha'),
      1e6,
      0.8910399,
      { 30: 4.17983, 45: 0.995318, 60: 0.492021, 90: 0.33176 },
    ],
    [
      'C-12 + C-12, 5 MeV',
      CARBON,
      5e6,
      6.20975,
      { 45: 3.1717, 60: 1.8094, 80: 0.27211, 90: 1.0749 },
    ],
    [
      'p + p, 0.5 MeV',
      species('proton'),
      0.5e6,
      0.158057,
      { 30: 1.085303, 60: 0.0649246, 90: 0.020735 },
    ],
  ] as const)('%s agrees with the published figures', (_, particle, energy, eta, values) => {
    const case_ = mott(particle, energy);
    expectRelative(case_.eta, eta, 4e-6);
    for (const [degrees, value] of Object.entries(values)) {
      expectRelative(case_.dcs(Number(degrees) * DEG), value, 3e-5);
    }
  });

  // Check value 38: the curve is flat at 90 degrees where eta² = 3s + 2.
  it.each([
    ['He-4', 2, 0, 0.397e6],
    ['Li-6', 3, 1, 1.21e6],
    ['B-10', 5, 3, 7.05e6],
  ])('%s is flat at 90 degrees at its energy', (name, charge, spin, energy) => {
    const entry = nuclide(name);
    expect(entry.spin).toBe(spin);
    const particle = { mass: nuclearMassEnergy(entry), charge, spin };
    const curvature = (e: number) => {
      const { dcs } = mott(particle, e);
      return dcs(90 * DEG + 0.01) + dcs(90 * DEG - 0.01) - 2 * dcs(90 * DEG);
    };
    expect(curvature(energy * 0.98) * curvature(energy * 1.02)).toBeLessThan(0);
    const mu = particle.mass / 2;
    const flat = (charge ** 4 * FINE_STRUCTURE ** 2 * mu) / (2 * (3 * spin + 2));
    expectRelative(energy, flat, 5e-3);
  });

  it('does not depend on which particle is called first, and is never negative', () => {
    const part = fc.double({ min: -5, max: 5, noNaN: true });
    const spin = fc.constantFrom(0, 0.5, 1, 1.5, 2, 3.5);
    fc.assert(
      fc.property(part, part, part, part, spin, (a, b, c, d, s) => {
        const one = exchangeDcs(exact(a, b), exact(c, d), s);
        const other = exchangeDcs(exact(c, d), exact(a, b), s);
        expect(Math.abs(one.value - other.value)).toBeLessThanOrEqual(one.error);
        expect(one.value).toBeGreaterThanOrEqual(0);
      }),
    );
  });

  it('bounds the error that amplitudes bring, also where the sum nearly cancels', () => {
    const f = fc.double({ min: -3, max: 3, noNaN: true });
    const e = fc.double({ min: -1e-3, max: 1e-3, noNaN: true });
    fc.assert(
      fc.property(f, f, e, e, (a, b, da, db) => {
        const stated = exchangeDcs(
          { re: a, im: 0, error: Math.abs(da) },
          { re: b, im: 0, error: Math.abs(db) },
          0.5,
        );
        const shifted = exchangeDcs(exact(a + da, 0), exact(b + db, 0), 0.5);
        expect(Math.abs(stated.value - shifted.value)).toBeLessThanOrEqual(
          stated.error + shifted.error,
        );
      }),
    );
  });

  it('makes the same species or nuclide identical, custom particles never', () => {
    const alpha = species('alpha');
    expect(identicalByRule(alpha, { identity: 'He-4', spin: 0 })).toBe(true);
    expect(identicalByRule(species('proton'), { identity: 'H-1', spin: 0.5 })).toBe(true);
    expect(identicalByRule(species('electron'), species('positron'))).toBe(false);
    expect(identicalByRule({ identity: null, spin: 0 }, { identity: null, spin: 0 })).toBe(false);
    expect(identicalByRule(alpha, null)).toBe(false);
  });

  it('refuses unknown, differing and impossible spins in words', () => {
    const unknown = { identity: 'Ca-45', spin: null };
    expect(() => exchangeSpin(unknown, unknown)).toThrow(/spin of Ca-45 is not in the table/);
    expect(() => exchangeSpin({ identity: null, spin: 0 }, { identity: null, spin: 1 })).toThrow(
      /one spin/,
    );
    expect(exchangeSpin({ identity: 'x', spin: null }, { identity: 'x', spin: 2.5 })).toBe(2.5);
    for (const spin of [-1, 0.25, NaN, Infinity]) {
      expect(() => exchangeWeight(spin)).toThrow(/A spin is 0, 0.5/);
    }
  });
});
