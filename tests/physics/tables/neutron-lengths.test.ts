import { describe, expect, it } from 'vitest';
import { ATOMIC_MASS_UNIT, AVOGADRO, NEUTRON_MASS } from '#server/physics/constants/codata2022.ts';
import { parseFormula } from '#server/physics/tables/formula.ts';
import {
  DIFFERS_FROM_SEARS,
  NEUTRON_EDITION,
  NEUTRON_ENTRIES,
  NEUTRON_WAVELENGTH,
  absorptionAt,
  boundLength,
  neutronEntry,
} from '#server/physics/tables/neutron-lengths.ts';
import { naturalIsotopes, nuclide } from '#server/physics/tables/nuclides.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { refusal } from './refusal.ts';

const values = (name: string) => {
  const { sigmaCoherent, sigmaIncoherent, sigmaAbsorption } = neutronEntry(name);
  return [sigmaCoherent?.value, sigmaIncoherent?.value, sigmaAbsorption?.value];
};

/** 4π|b|² in barn; the imaginary part as printed, or b'' = sigma k/4π from the absorption. */
function fromLength(name: string): number {
  const { b, imaginary, sigmaAbsorption } = neutronEntry(name);
  const part = imaginary ?? (sigmaAbsorption?.value ?? 0) / (2000 * NEUTRON_WAVELENGTH);
  return (4 * Math.PI * ((b?.value ?? NaN) ** 2 + part ** 2)) / 100;
}

describe('the table of neutron scattering lengths', () => {
  it('holds the values of its edition', () => {
    expect(NEUTRON_EDITION).toBe('Rauch and Waschkowski 2003');
    const lengths = {
      H: -3.7409,
      'H-2': 6.674,
      C: 6.6484,
      O: 5.805,
      Si: 4.15071,
      V: -0.443,
      Cd: 4.83,
    };
    const heavy = { Au: 7.9, W: 4.755, Ti: -3.37, Pb: 9.401 };
    for (const [name, b] of Object.entries({ ...lengths, ...heavy })) {
      expect(boundLength(name).value, name).toBe(b);
    }
    expect(boundLength('H').uncertainty).toBe(0.0011);
    expect(boundLength('He-3')).toEqual({ value: 5.74, uncertainty: 0.07, imaginary: -1.48 });
  });

  it.each([
    ['H', [1.7568, 80.26, 0.3326]],
    ['H-2', [5.592, 2.05, 0.000519]],
    ['C', [5.551, 0.001, 0.0035]],
    ['V', [0.01838, 5.08, 5.08]],
    ['Al', [1.495, 0.0082, 0.231]],
    ['Cd', [3.04, 3.46, 2520]],
    ['Au', [7.32, 0.43, 98.65]],
  ])('%s has the cross sections of its edition, barn', (name, expected) => {
    expect(values(name)).toEqual(expected);
  });

  it('has the strong absorbers', () => {
    const strong = { 'He-3': 5333, 'B-10': 3835, 'Li-6': 940, Gd: 49700 };
    for (const [name, sigma] of Object.entries(strong)) {
      expect(neutronEntry(name).sigmaAbsorption?.value, name).toBe(sigma);
    }
  });

  it('reads uncertainties in last digits and in units alike, and upper limits as such', () => {
    // 940.0(4.0), 0.00747(1), <6.0E-6, 0.5(5)* in the source.
    expect(neutronEntry('Li-6').sigmaAbsorption).toEqual({ value: 940, uncertainty: 4 });
    expect(neutronEntry('He').sigmaAbsorption).toEqual({ value: 0.00747, uncertainty: 1e-5 });
    expect(neutronEntry('H-3').remark).toBe('sigma_abs is an upper limit');
    expect(neutronEntry('K-40').remark).toBe('b is an estimate; sigma_inc is an estimate');
  });

  it('obeys 4π|b|² = sigma_coherent within 3 %, except where it says that it does not', () => {
    let checked = 0;
    for (const { name, b, sigmaCoherent, contradiction } of NEUTRON_ENTRIES) {
      if (b === null || sigmaCoherent === null) continue;
      const sigma = fromLength(name);
      if (contradiction === null) {
        // Half a unit of the second decimal is the coarsest rounding of small cross sections.
        const bound = Math.max(0.03 * sigmaCoherent.value, sigmaCoherent.value < 0.3 ? 0.05 : 0);
        expect(Math.abs(sigma - sigmaCoherent.value), name).toBeLessThanOrEqual(bound);
      } else {
        expectRelative(contradiction, sigma, 1e-3);
        expect(Math.abs(sigma / sigmaCoherent.value - 1), name).toBeGreaterThan(0.029);
      }
      checked += 1;
    }
    expect(checked).toBe(335);
  });

  it('lists the known contradictions: gold, vanadium, holmium, xenon, tungsten', () => {
    // Gold 7.90 fm gives 7.843 b beside 7.32 b printed, vanadium 0.025 b beside 0.018 b.
    expectRelative(neutronEntry('Au').contradiction ?? NaN, 7.843, 1e-4);
    expectRelative(neutronEntry('V').contradiction ?? NaN, 0.02466, 1e-3);
    for (const name of ['Ho', 'Xe', 'W', 'Te', 'Ti', 'Sc']) {
      expect(neutronEntry(name).contradiction, name).not.toBeNull();
    }
    for (const name of ['H', 'C', 'O', 'Al', 'Si', 'Fe', 'Ni', 'Cu', 'Gd-157']) {
      expect(neutronEntry(name).contradiction, name).toBeNull();
    }
  });

  it('gives for elements what their isotopes give, an independent route', () => {
    for (const symbol of ['Cl', 'Cr', 'Fe', 'Ni', 'Cu', 'Ag', 'Pb', 'Mg', 'Li']) {
      const mean = naturalIsotopes(symbol).reduce(
        (sum, { name, abundance }) => sum + (abundance ?? 0) * boundLength(name).value,
        0,
      );
      expectRelative(boundLength(symbol).value, mean, 0.03);
    }
  });

  it('is within 0.006 fm of Sears 1992 but for the elements it lists', () => {
    // Sears, Neutron News 3 no. 3 (1992) 26: an edition of its own.
    const sears = {
      H: -3.739,
      'H-2': 6.671,
      C: 6.646,
      N: 9.36,
      O: 5.803,
      Al: 3.449,
      Si: 4.1491,
      Fe: 9.45,
      Ni: 10.3,
    };
    for (const [name, b] of Object.entries(sears)) {
      expect(Math.abs(boundLength(name).value - b), name).toBeLessThan(0.006);
    }
    expect(DIFFERS_FROM_SEARS).toHaveLength(20);
    expect(DIFFERS_FROM_SEARS).toContainEqual({ symbol: 'Au', here: 7.9, sears: 7.63 });
    expect(DIFFERS_FROM_SEARS).toContainEqual({ symbol: 'V', here: -0.443, sears: -0.3824 });
  });
});

describe('scattering-length densities recomputed from the lengths', () => {
  // 1e-6 per angstrom², from an independent program on the same edition (Debian python3-periodictable 1.6.0).
  it.each([
    ['H2O', 1, -0.5605],
    ['D2O', 1.107, 6.3754],
    ['Si', 2.33, 2.0737],
    ['SiO2', 2.2, 3.4753],
    ['Ni', 8.902, 9.4078],
    ['CH2', 0.94, -0.3363],
  ])('%s at %f g/cm³ has %f', (text, density, expected) => {
    const { parts, molarMass } = parseFormula(text);
    const sum = parts.reduce(
      (total, { name, count }) => total + count * boundLength(name).value,
      0,
    );
    const perVolume = (density * AVOGADRO) / molarMass / 1e24;
    expectRelative(perVolume * sum * 1e-5 * 1e6, expected, 2e-3);
  });
});

describe('free and bound', () => {
  it('hydrogen scatters a quarter as much when it can recoil', () => {
    // (A/(A + 1))² = 0.2497918: bound 82.02 b, free 20.488 b (Sears 1992; 20.49 b in handbooks).
    const ratio = (nuclide('H-1').atomicMass * ATOMIC_MASS_UNIT) / NEUTRON_MASS;
    const factor = (ratio / (1 + ratio)) ** 2;
    expectRelative(factor, 0.2497918, 1e-6);
    const { sigmaCoherent, sigmaIncoherent } = neutronEntry('H');
    const bound = (sigmaCoherent?.value ?? NaN) + (sigmaIncoherent?.value ?? NaN);
    expectRelative(bound, 82.02, 1e-4);
    expectRelative(bound * factor, 20.488, 1e-4);
  });
});

describe('absorption by 1/v', () => {
  it('is proportional to the wavelength', () => {
    expect(absorptionAt('He-3', NEUTRON_WAVELENGTH)).toEqual({ value: 5333, uncertainty: 7 });
    expectRelative(absorptionAt('B-10', 3.596).value, 7670, 1e-12);
    expectRelative(absorptionAt('V', 0.899).uncertainty ?? NaN, 0.02, 1e-12);
  });

  it('agrees with the imaginary length of He-3: sigma = 4π b″/k', () => {
    expectRelative(2000 * NEUTRON_WAVELENGTH * 1.48, absorptionAt('He-3', 1.798).value, 3e-3);
  });

  it.each([
    'Cd',
    'Cd-113',
    'Sm',
    'Eu',
    'Eu-151',
    'Gd',
    'Gd-157',
    'Dy',
    'Ir',
    'Rh',
    'In',
    'Er',
    'Lu',
    'Hg',
  ])('is refused for %s, which absorbs through a resonance', (name) => {
    expect(refusal(() => absorptionAt(name, 1.8))).toContain('does not follow 1/v');
  });

  it('is allowed for ordinary absorbers', () => {
    for (const name of ['H', 'Li', 'B', 'Cl', 'V', 'Fe', 'Ag', 'Au', 'Ta', 'He-3', 'Cd-114']) {
      expect(neutronEntry(name).resonant, name).toBe(false);
    }
  });

  it.each([0, -1, NaN, Infinity])('refuses a wavelength of %f', (wavelength) => {
    expect(refusal(() => absorptionAt('V', wavelength))).toContain('is not positive');
  });
});

describe('names', () => {
  it('find an element of one isotope under both names', () => {
    expect(neutronEntry('Au')).toMatchObject({ name: 'Au', b: { value: 7.9 } });
    expect(neutronEntry('Au-197')).toMatchObject({ name: 'Au-197', b: { value: 7.9 } });
    expect(neutronEntry('Rh').resonant).toBe(true);
  });

  it('are refused with the mend', () => {
    expect(refusal(() => boundLength('Eu-151'))).toContain('give `b` yourself');
    expect(refusal(() => boundLength('Kr-78'))).toContain('name the natural element');
    expect(refusal(() => neutronEntry('Tc'))).toContain('it has Tc-99');
    expect(refusal(() => neutronEntry('Fe-60'))).toContain('Fe-54, Fe-56, Fe-57, Fe-58');
    expect(refusal(() => neutronEntry('58Ni'))).toContain('write Ni-58');
    expect(refusal(() => neutronEntry('au'))).toContain('did you mean Au');
    expect(refusal(() => neutronEntry('Es'))).toContain('has no Es');
    expect(refusal(() => neutronEntry('toString'))).toContain('is not an element');
    expect(refusal(() => absorptionAt('Po', 1.8))).toContain('has no Po');
  });
});
