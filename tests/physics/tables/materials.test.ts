import { describe, expect, it } from 'vitest';
import { AVOGADRO } from '#server/physics/constants/codata2022.ts';
import { chemicalElement } from '#server/physics/tables/elements.ts';
import { countOf, parseFormula } from '#server/physics/tables/formula.ts';
import {
  MATERIALS,
  gasUnitsPerVolume,
  material,
  materialDensity,
  unitsPerVolume,
} from '#server/physics/tables/materials.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { refusal } from './refusal.ts';

const perCubicCentimetre = (formula: string, density: number) =>
  unitsPerVolume(parseFormula(formula), density) * 1e24;

describe('number densities', () => {
  // Recomputed from IUPAC's abridged weights, per cm³.
  it.each([
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
  ])('%s at %f g/cm³ has %f units per cm³', (formula, density, expected) => {
    expectRelative(perCubicCentimetre(formula, density), expected, 1e-6);
  });

  it('count atoms: polyethylene has 8.071309e22 hydrogens per cm³', () => {
    const formula = parseFormula('CH2');
    const hydrogens = unitsPerVolume(formula, 0.94) * 1e24 * countOf(formula, 'H');
    expectRelative(hydrogens, 8.071309e22, 1e-6);
  });

  it.each([
    ['Au', 3.057443e15],
    ['C', 5.013855e16],
    ['12C', 5.018451e16],
    ['Al', 2.231949e16],
    ['CH2', 4.293249e16],
  ])('one µg of %s holds %f formula units', (formula, expected) => {
    expectRelative((1e-6 * AVOGADRO) / parseFormula(formula).molarMass, expected, 1e-6);
  });

  it('of gases follow from pressure and temperature: the Loschmidt constant', () => {
    // CODATA 2022: 2.686780111e25 per m³ at 101325 Pa and 273.15 K; 2.470739e19 per cm³ at one bar and 20 °C.
    expectRelative(gasUnitsPerVolume(101325, 273.15) * 1e30, 2.686780111e25, 1e-9);
    expectRelative(gasUnitsPerVolume(1e5, 293.15) * 1e24, 2.470739e19, 1e-6);
    expectRelative(gasUnitsPerVolume(2e5, 293.15), 2 * gasUnitsPerVolume(1e5, 293.15), 1e-14);
  });
});

describe('the table of materials', () => {
  it('has about forty, each with a key of its own and a formula that can be read', () => {
    expect(MATERIALS.length).toBeGreaterThanOrEqual(40);
    expect(new Set(MATERIALS.map(({ key }) => key)).size).toBe(MATERIALS.length);
    for (const { key, formula, source } of MATERIALS) {
      expect(key).toMatch(/^[a-z0-9]+(-[a-z0-9]+)*$/);
      expect(parseFormula(formula).molarMass, key).toBeGreaterThan(1);
      expect(source.length, key).toBeGreaterThan(20);
    }
  });

  it('gives densities to solids and liquids alone, within the range it states', () => {
    for (const { key, phase, density, range } of MATERIALS) {
      if (phase === 'gas') expect([density, range], key).toEqual([null, null]);
      else expect(density, key).toBeGreaterThan(0.5);
      if (density !== null && range !== null) {
        expect(range[0], key).toBeLessThanOrEqual(density);
        expect(range[1], key).toBeGreaterThanOrEqual(density);
      }
    }
  });

  it('agrees for pure elements with the table of elements, which has another source', () => {
    let compared = 0;
    for (const { key, formula, density } of MATERIALS) {
      const { parts } = parseFormula(formula);
      if (density === null || parts.length > 1 || formula === 'C') continue;
      expectRelative(density, chemicalElement(parts[0]?.symbol ?? '').density ?? NaN, 2e-3);
      compared += 1;
      expect(key).toBe(chemicalElement(formula).name.toLowerCase());
    }
    expect(compared).toBe(20);
  });

  // Edge of the cubic cell in angstrom and formula units in it (Wyckoff, Crystal Structures), from memory: densities from crystallography.
  it.each([
    ['silicon', 5.431, 8],
    ['germanium', 5.658, 8],
    ['diamond', 3.567, 8],
    ['aluminium', 4.0496, 4],
    ['copper', 3.6149, 4],
    ['silver', 4.0857, 4],
    ['gold', 4.0782, 4],
    ['lead', 4.9505, 4],
    ['tungsten', 3.1652, 2],
    ['lithium-fluoride', 4.0263, 4],
    ['calcium-fluoride', 5.4626, 4],
    ['caesium-iodide', 4.567, 1],
    ['sodium-iodide', 6.4728, 4],
  ])('%s has the density of its crystal cell', (key, edge, units) => {
    const { formula } = material(key);
    const cell = (units * parseFormula(formula).molarMass) / (AVOGADRO * (edge * 1e-8) ** 3);
    // Handbooks print three digits, and those of CsI and its cell are 0.4 % apart.
    expectRelative(materialDensity(key), cell, 5e-3);
  });

  it('has the air of handbooks: 28.96 g/mol, 1.2048e-3 g/cm³ at 20 °C and one atmosphere', () => {
    const air = parseFormula(material('air').formula);
    expectRelative(air.molarMass, 28.9655, 2e-4);
    const perVolume = gasUnitsPerVolume(101325, 293.15) * 1e24;
    expectRelative((perVolume * air.molarMass) / AVOGADRO, 1.2048e-3, 1e-3);
  });

  it('names no dose and no activity', () => {
    for (const { key, notes } of MATERIALS) {
      expect(notes, key).not.toMatch(/\b(Bq|Ci|Sv|Gy|rem|dose|activity|half-life)\b/i);
    }
  });
});

describe('refusals', () => {
  it.each([
    ['Gold', 'did you mean gold?'],
    ['Au', 'did you mean gold?'],
    ['SiO2', 'did you mean silica?'],
    ['helium', 'did you mean helium-gas or helium-3-gas?'],
    ['cesium', 'known: graphite'],
    ['', 'known: graphite'],
    ['__proto__', 'by formula and density'],
  ])('%s: %s', (key, mend) => {
    expect(refusal(() => material(key))).toContain(mend);
  });

  it('ask pressure and temperature of a gas', () => {
    expect(refusal(() => materialDensity('argon-gas'))).toContain(
      'give its pressure and temperature',
    );
  });

  it('name the range', () => {
    const water = parseFormula('H2O');
    for (const bad of [0, -1, 997, NaN, Infinity]) {
      expect(refusal(() => unitsPerVolume(water, bad))).toContain('check the unit');
      if (bad !== 997)
        expect(refusal(() => gasUnitsPerVolume(bad, 300))).toContain('Pa is out of range');
      if (bad !== 997) expect(refusal(() => gasUnitsPerVolume(1e5, bad))).toContain('293.15 K');
    }
  });
});
