import { describe, expect, test } from 'vitest';
import { betheObstacle, meanLoss, stoppingPower } from '#server/physics/counting/bethe.ts';
import { closestApproach, nuclearReach } from '#server/physics/counting/closest-approach.ts';
import { highlandAngle } from '#server/physics/counting/highland.ts';
import {
  ALPHA_MASS,
  AVOGADRO,
  ELECTRON_MASS,
  PROTON_MASS,
} from '#server/physics/constants/codata2022.ts';
import { atomicWeight } from '#server/physics/tables/elements.ts';
import { parseFormula } from '#server/physics/tables/formula.ts';
import { gasUnitsPerVolume, unitsPerVolume } from '#server/physics/tables/materials.ts';
import {
  electronsPerGram,
  meanExcitation,
  meanExcitationOf,
} from '#server/physics/tables/mean-excitation.ts';
import { atomicNumber } from '#server/physics/tables/nuclides.ts';
import { radiationLength, radiationLengthOf } from '#server/physics/tables/radiation-length.ts';
import { refusal } from '#tests/physics/tables/refusal.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const MEV = 1e6;
const proton = { mass: PROTON_MASS, charge: 1, kind: 'heavy' as const };
const alpha = { mass: ALPHA_MASS, charge: 2, kind: 'heavy' as const };
const mediumOf = (text: string) => {
  const formula = parseFormula(text);
  return { electronsPerGram: electronsPerGram(formula), excitation: meanExcitationOf(formula) };
};

describe('nuclei in a target', () => {
  test.each([
    ['Au', 19.3, 5.900865e22],
    ['Au', 19.32, 5.90698e22],
    ['C', 2.21, 1.108062e23],
    ['C', 2.267, 1.136641e23],
    ['Al', 2.699, 6.024029e22],
    ['Cu', 8.96, 8.491232e22],
    ['Si', 2.329, 4.99397e22],
    ['Pb', 11.35, 3.298808e22],
    ['Be', 1.848, 1.234875e23],
    ['V', 6.11, 7.223046e22],
    ['Fe', 7.874, 8.491062e22],
    ['CH2', 0.94, 4.035654e22],
    ['H2O', 0.99705, 3.332987e22],
  ])('%s at %d g/cm3: %d formula units a cm3', (text, density, expected) => {
    // The weights of the table are the abridged ones of 2021; those of the printed values differ in the last digits.
    expectRelative(unitsPerVolume(parseFormula(text), density) * 1e24, expected, 6e-5);
  });

  test.each([
    ['Au', 3.057443e15],
    ['C', 5.013855e16],
    ['[12C]', 5.018451e16],
    ['Al', 2.231949e16],
    ['CH2', 4.293249e16],
  ])('a microgram of %s a cm2: %d', (text, expected) => {
    expectRelative((1e-6 * AVOGADRO) / parseFormula(text).molarMass, expected, 6e-5);
  });

  test('a gas at 1 bar and 293.15 K: 2.470739e19 a cm3; at 273.15 K and an atmosphere Loschmidt 2.686780112e19', () => {
    expectRelative(gasUnitsPerVolume(1e5, 293.15) * 1e24, 2.470739e19, 2e-7);
    expectRelative(gasUnitsPerVolume(101_325, 273.15) * 1e24, 2.686780112e19, 1e-9);
  });
});

describe('radiation lengths', () => {
  test.each([
    ['H', 63.047, 63.04],
    ['Be', 65.19, 65.19],
    ['C', 42.697, 42.7],
    ['Al', 24.011, 24.01],
    ['Si', 21.823, 21.82],
    ['Fe', 13.838, 13.84],
    ['Cu', 12.863, 12.86],
    ['Ag', 8.97, 8.97],
    ['W', 6.763, 6.76],
    ['Au', 6.461, 6.46],
    ['Pb', 6.37, 6.37],
  ])('%s: %d g/cm2, printed %d (Review of Particle Physics)', (symbol, formula, printed) => {
    const found = radiationLength(atomicNumber(symbol), atomicWeight(symbol));
    expectRelative(found, formula, 1.2e-4);
    expectRelative(found, printed, 5e-4);
  });

  test.each([
    ['Al', 2.699, 8.897],
    ['Si', 2.329, 9.37],
    ['Fe', 7.874, 1.757],
    ['Cu', 8.96, 1.436],
    ['Au', 19.32, 0.3344],
    ['Pb', 11.35, 0.5612],
    ['W', 19.3, 0.3504],
  ])('%s at %d g/cm3: %d cm', (symbol, density, expected) => {
    const found = radiationLength(atomicNumber(symbol), atomicWeight(symbol)) / density;
    expectRelative(found, expected, 5e-4);
  });

  test('polyethylene by weight fractions: 44.774, printed 44.77', () => {
    expectRelative(radiationLengthOf(parseFormula('CH2')), 44.774, 1e-4);
  });

  test('one element by itself and as a material is one', () => {
    const alone = radiationLength(79, atomicWeight('Au'));
    expectRelative(radiationLengthOf(parseFormula('Au')), alone, 1e-15);
    expectRelative(radiationLengthOf(parseFormula('Au3')), alone, 1e-14);
  });
});

describe('Highland', () => {
  // β = 1 and a momentum of 1 GeV: βcp = 1 GeV.
  const at = (radiationLengths: number, charge = 1) =>
    highlandAngle({ radiationLengths, momentum: 1e9, beta: 1, charge });

  test.each([
    [1, 13.6],
    [0.01, 1.122],
    [0.001, 0.317179],
  ])('x/X0 = %d: %d mrad', (x, mrad) => expectRelative((at(x) ?? NaN) * 1e3, mrad, 3e-5));

  test('says nothing outside its range', () => {
    expect(at(9e-4)).toBeNull();
    expect(at(101)).toBeNull();
    expect(at(2.99e-4)).toBeNull();
  });

  test('twice the charge turns twice as far, but for the logarithm', () => {
    expectRelative((at(0.1, 2) ?? NaN) / (at(0.1) ?? NaN), 2, 0.08);
    expect(at(0.1, -1)).toBe(at(0.1));
  });
});

describe('energy loss', () => {
  test.each([
    [100, 7.289, 7.29],
    [200, 4.492, 4.492],
  ])(
    'protons of %i MeV in water: %d MeV cm2/g (ICRU 49), %d by the formula',
    (energy, icru, formula) => {
      const found = stoppingPower(energy * MEV, proton, mediumOf('H2O')) / MEV;
      expectRelative(found, icru, 1e-3);
      expectRelative(found, formula, 3e-4);
    },
  );

  test('10 MeV: 45.95 without shell corrections, 45.67 in ICRU 49', () => {
    const found = stoppingPower(10 * MEV, proton, mediumOf('H2O')) / MEV;
    expectRelative(found, 45.95, 5e-4);
    expectRelative(found, 45.67, 1e-2);
  });

  test('alpha particles of 5.486 MeV in gold: 0.23 MeV cm2/mg within the tables (ICRU 49, from memory)', () => {
    const found = stoppingPower(5.486 * MEV, alpha, mediumOf('Au')) / MEV / 1e3;
    expectRelative(found, 0.23, 0.07);
  });

  test('electrons of 100 keV in carbon: 3.67 MeV cm2/g of collisions (ICRU 37, from memory)', () => {
    const electron = { mass: ELECTRON_MASS, charge: -1, kind: 'electron' as const };
    const found = stoppingPower(1e5, electron, mediumOf('C')) / MEV;
    expectRelative(found, 3.67, 2e-2);
    const positron = { ...electron, charge: 1, kind: 'positron' as const };
    expectRelative(stoppingPower(1e5, positron, mediumOf('C')) / MEV / found, 1.03, 2e-2);
  });

  test('an alpha particle loses four times what a proton of its speed does', () => {
    const medium = mediumOf('Al');
    const same = stoppingPower((20 * MEV * ALPHA_MASS) / PROTON_MASS, alpha, medium);
    expectRelative(same / stoppingPower(20 * MEV, proton, medium), 4, 2e-4);
  });

  test('in a thin layer the loss is the stopping power times the thickness, in a thick one its integral', () => {
    const medium = mediumOf('Al');
    const energy = 50 * MEV;
    const thin = meanLoss(energy, 1e-4, proton, medium);
    const slope = stoppingPower(energy, proton, medium);
    expectRelative('lossTo' in thin ? thin.lossTo(1) : NaN, slope * 1e-4, 1e-4);
    const thick = meanLoss(energy, 1.2, proton, medium);
    if ('none' in thick) throw new Error(thick.none);
    // ∫ dE/S(E) over the loss is the thickness.
    const steps = 2000;
    const lost = thick.lossTo(1);
    let thickness = 0;
    for (let i = 0; i < steps; i++) {
      const at = energy - (lost * (i + 0.5)) / steps;
      thickness += lost / steps / stoppingPower(at, proton, medium);
    }
    expectRelative(thickness, 1.2, 1e-6);
    expect(thick.lossTo(0)).toBe(0);
    expectRelative(thick.lossTo(0.5), meanLossTo(energy, 0.6, medium), 1e-5);
  });

  const meanLossTo = (energy: number, thickness: number, medium: ReturnType<typeof mediumOf>) => {
    const found = meanLoss(energy, thickness, proton, medium);
    return 'lossTo' in found ? found.lossTo(1) : NaN;
  };

  test('says why where the formula does not hold', () => {
    expect(betheObstacle(1 * MEV, proton)).toMatch(/βγ/);
    expect(betheObstacle(5 * MEV, proton)).toBeNull();
    expect(betheObstacle(5.486 * MEV, alpha)).toBeNull();
    expect(betheObstacle(30 * MEV, { mass: 11_177.9e6, charge: 6, kind: 'heavy' })).toMatch(
      /carries electrons/,
    );
    expect(betheObstacle(100, { mass: ELECTRON_MASS, charge: -1, kind: 'electron' })).toMatch(
      /10 keV/,
    );
    const stopped = meanLoss(5 * MEV, 10, proton, mediumOf('Al'));
    expect('none' in stopped ? stopped.none : '').toMatch(/thinner/);
  });

  test('mean excitation energies: printed ones, mixtures between their elements, none beyond uranium', () => {
    const values = ['C', 'Al', 'Si', 'Cu', 'Au', 'Pb'].map(meanExcitation);
    expect(values).toEqual([78, 166, 173, 322, 790, 823]);
    expect(meanExcitationOf(parseFormula('H2O'))).toBe(75);
    expect(meanExcitationOf(parseFormula('CH2'))).toBe(57.4);
    const mixed = meanExcitationOf(parseFormula('SiO2'));
    expect(mixed).toBeGreaterThan(95);
    expect(mixed).toBeLessThan(173);
    expectRelative(meanExcitationOf(parseFormula('Au2')), 790, 1e-14);
    expect(refusal(() => meanExcitation('Pu'))).toMatch(/uranium/);
  });
});

describe('how near the nuclei come', () => {
  test.each([
    [5, 45.503],
    [5.486, 41.472],
    [7.7, 29.547],
  ])('alpha particles of %d MeV on fixed gold, head on: %d fm', (energy, fm) => {
    expectRelative(closestApproach(158, energy * MEV, Math.PI) * 1e5, fm, 2e-5);
  });

  test('with recoil of Au-197 42.314 fm at 5.486 MeV', () => {
    const share = 196.96657 / (196.96657 + 4.0015);
    expectRelative(closestApproach(158, 5.486 * MEV * share, Math.PI) * 1e5, 42.314, 2e-4);
  });

  test('a glancing orbit stays further away, nuclei feel each other at about 12 fm', () => {
    expect(closestApproach(158, MEV, 0.5)).toBeGreaterThan(2 * closestApproach(158, MEV, 3));
    expectRelative(nuclearReach(4, 197) * 1e5, 1.2 * (1.5874 + 5.8186) + 3, 1e-4);
  });
});
