import { describe, expect, it } from 'vitest';
import { firstBorn } from '#server/physics/methods/born1.ts';
import { contactByName } from '#server/physics/potentials/contact-by-name.ts';
import type { FormContext, FormValues } from '#server/physics/potentials/types.ts';
import { parseFormula } from '#server/physics/tables/formula.ts';
import { unitsPerVolume } from '#server/physics/tables/materials.ts';
import { NEUTRON_ENTRIES } from '#server/physics/tables/neutron-lengths.ts';
import { DomainError } from '#shared/errors.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const FERMI = 1e-5;
const BARN = 1e-8;
const NEUTRON_ON_FIXED: FormContext = {
  twoMuOverHbar2: 482.596,
  projectileCharge: 0,
  targetCharge: 0,
  projectile: 'neutron',
  recoilFactor: 1,
};

function amplitude(values: FormValues, context = NEUTRON_ON_FIXED) {
  const term = contactByName.build(values, context);
  const f = firstBorn([term], context.twoMuOverHbar2).amplitude(1.3);
  return { re: f?.re ?? NaN, im: f?.im ?? NaN, incoherent: term.incoherent };
}

function refusal(values: FormValues, context = NEUTRON_ON_FIXED): string {
  try {
    contactByName.build(values, context);
  } catch (error) {
    if (error instanceof DomainError) return `${error.details.errors?.[0]?.path}: ${error.message}`;
    throw error;
  }
  return 'taken';
}

describe('contact by element and nuclide', () => {
  // V. F. Sears, Neutron News 3 no. 3 (1992) 26, and H. Rauch and W. Waschkowski (2003) where they moved a length.
  it.each([
    ['H', -3.7409],
    ['C', 6.6484],
    ['N', 9.36],
    ['O', 5.805],
    ['Al', 3.449],
    ['Si', 4.15071],
    ['V', -0.443],
    ['Fe', 9.45],
    ['Ni', 10.3],
    ['Au', 7.9],
    ['Ti', -3.37],
    ['W', 4.755],
    ['Pb', 9.401],
  ] as const)('%s: f = -b, b = %d fm for a fixed nucleus', (element, b) => {
    const f = amplitude({ element });
    expectRelative(f.re, -b * FERMI, 1e-15);
    expect(Math.abs(f.im)).toBe(0);
  });

  it('nuclides: deuterium 6.674 fm; an element of one isotope under both names', () => {
    expectRelative(amplitude({ nuclide: 'H-2' }).re, -6.674 * FERMI, 1e-15);
    expect(amplitude({ nuclide: 'Al-27' }).re).toBe(amplitude({ element: 'Al' }).re);
  });

  it('a printed imaginary part of b absorbs: boron takes 4π/k times it', () => {
    const f = amplitude({ element: 'B' });
    expectRelative(f.re, -5.3 * FERMI, 1e-15);
    expectRelative(f.im, 0.21 * FERMI, 1e-15);
    // 1/v law at 1.798 angstrom: 4π b''/k with k = 3.494 per angstrom, against 767 b printed.
    expectRelative((4 * Math.PI * f.im) / 3.494 / BARN, 767, 0.02);
  });

  it('hydrogen that recoils: bound 82.02 b becomes 20.488 b free, a factor 0.2497918', () => {
    const [m, M] = [1.00866491606, 1.00782503223];
    const recoilFactor = M / (m + M);
    expectRelative(recoilFactor ** 2, 0.2497918, 2e-7);
    const free = amplitude({ element: 'H' }, { ...NEUTRON_ON_FIXED, recoilFactor });
    const bound = amplitude({ element: 'H' });
    expectRelative(free.re / bound.re, recoilFactor, 1e-14);
    const total = ({ re, incoherent = NaN }: typeof free) => 4 * Math.PI * (re * re + incoherent);
    expectRelative(total(bound) / BARN, 82.02, 3e-4);
    expectRelative(total(free) / BARN, 20.488, 3e-4);
  });

  it('incoherent scattering is sigma_inc/4π and no part of the amplitude', () => {
    // H. Rauch and W. Waschkowski (2003): V 5.08 b, H 80.26 b, D 2.05 b.
    for (const [values, sigma] of [
      [{ element: 'V' }, 5.08],
      [{ element: 'H' }, 80.26],
      [{ nuclide: 'H-2' }, 2.05],
    ] as const) {
      expectRelative(4 * Math.PI * (amplitude(values).incoherent ?? NaN), sigma * BARN, 1e-14);
    }
    expect(amplitude({ b: 1e-5 }).incoherent).toBeUndefined();
  });

  it('every row of the table is taken or refused in words', () => {
    for (const { name, b, resonant, sigmaIncoherent } of NEUTRON_ENTRIES) {
      const values = /\d/.test(name) ? { nuclide: name } : { element: name };
      if (b === null || resonant) {
        expect(refusal(values)).toMatch(/give b/i);
        continue;
      }
      const f = amplitude(values);
      expectRelative(f.re, -b.value * FERMI, 1e-14);
      expect(f.im).toBeGreaterThanOrEqual(0);
      expect(f.incoherent === undefined).toBe(sigmaIncoherent === null);
    }
  });

  // Public table of the scattering-length densities; recomputed from the lengths by an independent program.
  it.each([
    ['H2O', 1, -0.5605],
    ['D2O', 1.107, 6.3754],
    ['Si', 2.33, 2.0737],
    ['SiO2', 2.2, 3.4753],
    ['Ni', 8.902, 9.4078],
    ['CH2', 0.94, -0.3363],
  ] as const)(
    '%s at %d g/cm³: scattering-length density %d e-6 per square angstrom',
    (text, density, expected) => {
      const formula = parseFormula(text);
      const sum = formula.parts.reduce((total, { name, count }) => {
        const values = /\d/.test(name) ? { nuclide: name } : { element: name };
        return total - count * amplitude(values).re;
      }, 0);
      expectRelative(1e6 * unitsPerVolume(formula, density) * sum, expected, 2e-3);
    },
  );

  it('b given by hand is the contact form itself', () => {
    const f = amplitude({ b: -3.7e-5 }, { ...NEUTRON_ON_FIXED, projectile: 'proton' });
    expectRelative(f.re, 3.7e-5, 1e-15);
  });

  it('refuses in words', () => {
    expect(refusal({})).toMatch(/^\/b: Give exactly one of b, nuclide, element/);
    expect(refusal({ b: 1, element: 'Ni' })).toMatch(
      /^\/element: Give exactly one .* not b and element/,
    );
    expect(refusal({ nuclide: 'V-51', element: 'V' })).toMatch(
      /^\/element: Give exactly one .* not nuclide and element/,
    );
    expect(refusal({ nuclide: 'Ni' })).toMatch(/^\/nuclide: Ni is no nuclide/);
    expect(refusal({ element: 'Ni-58' })).toMatch(/^\/element: Ni-58 is no element/);
    expect(refusal({ element: 'Xx' })).toMatch(/^\/element: .*Xx/);
    expect(refusal({ element: 'Cd' })).toMatch(/depends on the energy/);
    expect(refusal({ element: 'C' }, { ...NEUTRON_ON_FIXED, projectile: 'proton' })).toMatch(
      /slow neutrons/,
    );
    const lacking = {
      twoMuOverHbar2: 1,
      projectileCharge: 0,
      targetCharge: 0,
      projectile: 'neutron',
    };
    expect(() => contactByName.build({ element: 'C' }, lacking)).toThrow(/recoil factor/);
  });
});
