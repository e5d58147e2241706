import { describe, expect, it } from 'vitest';
import {
  BOLTZMANN_EV_K,
  COULOMB_EV_ANGSTROM,
  CONSTANTS,
  FINE_STRUCTURE,
  HBAR_C_EV_ANGSTROM,
  HBAR_EV_S,
  SPEED_OF_LIGHT_ANGSTROM_S,
} from '#server/physics/constants/codata2022.ts';
import codata from '#tests/reference/constants/codata.json' with { type: 'json' };
import { expectRelative } from '#tests/support/expect-relative.ts';

const printed = Object.entries(codata['2022']);

describe('CODATA 2022', () => {
  it.each(printed)(
    '%s has the printed value and uncertainty',
    (key, { value, uncertainty, scale }) => {
      const mine = CONSTANTS[key as keyof typeof CONSTANTS];
      expectRelative(mine.value, value * scale, 4e-16);
      expectRelative(mine.uncertainty, uncertainty * scale, 1e-12);
      expect(mine.edition).toBe('CODATA 2022');
    },
  );

  it.each(Object.entries(codata['2018']))(
    '%s lies within 5 standard uncertainties of the 2018 value',
    (key, { value, uncertainty, scale }) => {
      const mine = CONSTANTS[key as keyof typeof CONSTANTS];
      const spread = Math.hypot(uncertainty * scale, mine.uncertainty);
      expect(Math.abs(mine.value - value * scale)).toBeLessThanOrEqual(5 * spread);
    },
  );

  // Check values 1 to 5, 2022 and 2018 editions.
  it('quotes the check values of both editions', () => {
    expect(CONSTANTS.bohrRadius.value).toBe(0.529177210544);
    expect(CONSTANTS.fineStructure.value).toBe(7.2973525643e-3);
    expect(CONSTANTS.electronMass.value).toBe(510998.95069);
    expect(CONSTANTS.alphaMass.value).toBe(3727379411.8);
    expect(CONSTANTS.atomicMass.value).toBe(931494103.72);
    const old = codata['2018'];
    expect(old.bohrRadius.value).toBe(5.29177210903e-11);
    expect(old.fineStructure.value).toBe(7.2973525693e-3);
    expect(old.electronMass.value).toBe(0.51099895);
    expect(old.protonMass.value).toBe(938.27208816);
    expect(old.neutronMass.value).toBe(939.56542052);
    expect(old.deuteronMass.value).toBe(1875.61294257);
    expect(old.alphaMass.value).toBe(3727.3794066);
    expect(old.atomicMass.value).toBe(931.49410242);
  });

  it('derives hbar c, hbar and e² from the exact h, e and c (check values 6 and 7)', () => {
    const { planck, elementaryCharge, speedOfLight, boltzmann } = CONSTANTS;
    const hbar = planck.value / (2 * Math.PI) / elementaryCharge.value;
    expectRelative(HBAR_EV_S, hbar, 5e-16);
    expectRelative(HBAR_C_EV_ANGSTROM, hbar * speedOfLight.value * 1e10, 5e-16);
    expectRelative(HBAR_C_EV_ANGSTROM, HBAR_EV_S * SPEED_OF_LIGHT_ANGSTROM_S, 5e-16);
    expectRelative(COULOMB_EV_ANGSTROM, FINE_STRUCTURE * HBAR_C_EV_ANGSTROM, 5e-16);
    expectRelative(BOLTZMANN_EV_K, boltzmann.value / elementaryCharge.value, 1e-16);
    // Printed as 197.3269804… MeV fm: cut, not rounded.
    expect(Math.floor(HBAR_C_EV_ANGSTROM * 1e6)).toBe(1973269804);
    expectRelative(COULOMB_EV_ANGSTROM, 14.3996455, 3e-9);
    // Likewise (hbar c)² = 0.3893793721… GeV² mb; 1 GeV² mb is 1e18 eV² times 1e-11 angstrom².
    expect(Math.floor(HBAR_C_EV_ANGSTROM ** 2 * 1e3)).toBe(3893793721);
  });

  it('is consistent with itself: a0, hartree and r_e follow from alpha, m_e and hbar c', () => {
    const electron = CONSTANTS.electronMass.value;
    expectRelative(
      CONSTANTS.bohrRadius.value,
      HBAR_C_EV_ANGSTROM / (FINE_STRUCTURE * electron),
      1e-9,
    );
    expectRelative(CONSTANTS.hartree.value, FINE_STRUCTURE ** 2 * electron, 1e-9);
    expectRelative(CONSTANTS.classicalElectronRadius.value, COULOMB_EV_ANGSTROM / electron, 1e-9);
    // Check value 10: 2.8179403262 fm and 0.66524587321 b (2018); the editions differ in the tenth digit.
    expectRelative(CONSTANTS.classicalElectronRadius.value, 2.8179403262e-5, 3e-9);
    const thomson = (8 * Math.PI * CONSTANTS.classicalElectronRadius.value ** 2) / 3;
    expectRelative(thomson, 0.66524587321e-8, 6e-9);
  });
});
