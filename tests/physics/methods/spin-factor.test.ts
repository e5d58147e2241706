import { describe, expect, it } from 'vitest';
import {
  ELECTRON_MASS,
  HBAR_C_EV_ANGSTROM,
  PROTON_MASS,
} from '#server/physics/constants/codata2022.ts';
import { twoBody } from '#server/physics/kinematics/two-body.ts';
import {
  mckinleyFeshbachFactor,
  mottCrossSection,
  recoilRatio,
  spinFactor,
} from '#server/physics/methods/spin-factor.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const RIGHT = Math.PI / 2;
/** 1 angstrom² is 1e8 barn. */
const BARN = 1e8;
const gammaOf = (energy: number) => 1 + energy / ELECTRON_MASS;
const electronOn = (charge: number, energy: number, theta: number, targetMass = Infinity) => ({
  chargeProduct: -charge,
  mass: ELECTRON_MASS,
  targetMass,
  energy,
  theta,
});

// Values recomputed by an independent program from N. F. Mott's formula (1929).
describe('spin of relativistic leptons', () => {
  it('Mott factor at 90 degrees: 0.849727 at 100 keV, 0.557185 at 1 MeV', () => {
    expectRelative(spinFactor(gammaOf(1e5), RIGHT).value, 0.849727, 6e-7);
    expectRelative(spinFactor(gammaOf(1e6), RIGHT).value, 0.557185, 9e-7);
  });

  it('is 1 forward and 1/gamma² backward, to the last digits for any speed', () => {
    for (const gamma of [1, 1 + 1e-9, 3, 1e6, 1e12]) {
      expect(spinFactor(gamma, 0).value).toBe(1);
      const { value, error } = spinFactor(gamma, Math.PI);
      expect(Math.abs(value - gamma ** -2)).toBeLessThanOrEqual(error + 4e-33);
    }
  });

  it('dσ/dΩ at 90 degrees: 1.0903266 b/sr for 1 MeV on Al, 3260.87 b/sr for 100 keV on Au', () => {
    const aluminium = mottCrossSection(electronOn(13, 1e6, RIGHT));
    expectRelative(aluminium.value * BARN, 1.0903266, 1e-7);
    const gold = mottCrossSection(electronOn(79, 1e5, RIGHT));
    expectRelative(gold.value * BARN, 3260.87, 1.6e-6);
  });

  it('1 GeV on a point proton: 484.0765 MeV are left at 90 degrees, 1.07782 microbarn/sr at 30 without recoil', () => {
    const energy = 1e9 - ELECTRON_MASS;
    const ratio = recoilRatio(ELECTRON_MASS, PROTON_MASS, energy, RIGHT).value;
    // Printed without the mass of the electron, which adds 5e-7.
    expectRelative(ratio * 1e3, 484.0765, 6e-7);
    expectRelative(recoilRatio(1, PROTON_MASS, 1e9, RIGHT).value * 1e3, 484.0765, 1.5e-7);
    // Q² = 2 E E' (1 - cos theta)
    expectRelative(2 * ratio, 0.96815, 5e-6);
    const light = mottCrossSection(electronOn(1, energy, Math.PI / 6));
    expectRelative(light.value * BARN * 1e6, 1.07782, 4e-6);
    const heavy = mottCrossSection(electronOn(1, energy, RIGHT, PROTON_MASS));
    const fixed = mottCrossSection(electronOn(1, energy, RIGHT));
    expectRelative(heavy.value / fixed.value, ratio, 1e-14);
  });

  it('recoil: elastic kinematics of four-vectors', () => {
    for (const energy of [10, 1e5, 3e8, 1e11]) {
      for (const theta of [0, 0.4, RIGHT, 2.5, Math.PI]) {
        const { value, error } = recoilRatio(ELECTRON_MASS, PROTON_MASS, energy, theta);
        const before = energy + ELECTRON_MASS;
        const after = value * before;
        const [p, pAfter] = [before, after].map((E) => Math.sqrt(E * E - ELECTRON_MASS ** 2));
        // (p + P - p')² = M²
        const balance =
          ELECTRON_MASS ** 2 +
          PROTON_MASS * (before - after) -
          before * after +
          (p ?? NaN) * (pAfter ?? NaN) * Math.cos(theta);
        expect(Math.abs(balance)).toBeLessThan(
          1e-14 * before * (PROTON_MASS + before) + 2 * error * before * (PROTON_MASS + before),
        );
        if (theta === 0) expectRelative(value, 1, 1e-14);
      }
    }
    // Head-on on an equal mass the projectile stops: its mass is left.
    const stopped = recoilRatio(PROTON_MASS, PROTON_MASS, 1e9, 0).value;
    expectRelative(stopped, 1, 1e-14);
    expectRelative(
      recoilRatio(PROTON_MASS, PROTON_MASS, 1e9, RIGHT).value,
      PROTON_MASS / (1e9 + PROTON_MASS),
      1e-14,
    );
  });

  it('McKinley-Feshbach: 1 MeV on Au at 90 degrees 0.910 for electrons, 0.204 for positrons, 0.557 without', () => {
    const gamma = gammaOf(1e6);
    expectRelative(mckinleyFeshbachFactor(gamma, RIGHT, -79).value, 0.91, 6e-4);
    expectRelative(mckinleyFeshbachFactor(gamma, RIGHT, 79).value, 0.204, 2e-3);
    expect(mckinleyFeshbachFactor(gamma, RIGHT, 0).value).toBe(spinFactor(gamma, RIGHT).value);
    // No correction forward and backward, opposite for opposite charges.
    for (const theta of [0, Math.PI]) {
      const apart =
        mckinleyFeshbachFactor(gamma, theta, -79).value - spinFactor(gamma, theta).value;
      expect(Math.abs(apart)).toBeLessThan(1e-31);
    }
    const corrected = mottCrossSection({ ...electronOn(79, 1e6, RIGHT), mckinleyFeshbach: true });
    const plain = mottCrossSection(electronOn(79, 1e6, RIGHT));
    expectRelative(corrected.value / plain.value, 0.91 / 0.557185, 1e-3);
  });

  it('a fixed charge without spin is the first Born amplitude of a point charge', () => {
    const energy = 2e5;
    const { k, twoMuOverHbar2 } = twoBody({
      projectileMass: ELECTRON_MASS,
      targetMass: Infinity,
      energy,
      regime: 'relativistic',
    });
    const theta = 0.7;
    const q = 2 * k * Math.sin(theta / 2);
    const f = (twoMuOverHbar2 * 29 * 7.2973525643e-3 * HBAR_C_EV_ANGSTROM) / q ** 2;
    const whole = mottCrossSection(electronOn(29, energy, theta)).value;
    expectRelative(whole, f * f * spinFactor(gammaOf(energy), theta).value, 1e-14);
  });

  it('refuses what has no meaning', () => {
    expect(() => spinFactor(0.99, 1)).toThrow(RangeError);
    expect(() => spinFactor(NaN, 1)).toThrow(RangeError);
    expect(() => spinFactor(2, -0.1)).toThrow(RangeError);
    expect(() => spinFactor(2, NaN)).toThrow(RangeError);
    expect(() => mottCrossSection(electronOn(1, 1e6, 0))).toThrow(/diverges/);
    expect(() => mottCrossSection(electronOn(1, -1, 1))).toThrow(RangeError);
    expect(() => recoilRatio(2, 1, 1, 1)).toThrow(/heavier/);
  });
});
