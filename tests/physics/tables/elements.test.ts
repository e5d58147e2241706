import { describe, expect, it } from 'vitest';
import {
  ELEMENTS,
  ELEMENTS_EDITION,
  atomicWeight,
  chemicalElement,
  elementDensity,
} from '#server/physics/tables/elements.ts';
import { ELEMENT_SYMBOLS, naturalIsotopes } from '#server/physics/tables/nuclides.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { refusal } from './refusal.ts';

describe('the table of elements', () => {
  it('holds the values of its edition', () => {
    expect(ELEMENTS_EDITION).toBe('CIAAW 2021');
    // Prohaska et al. 2022; Zn was 65.409 and Mo 95.94 in the tables of 1999 and 2001.
    expect(atomicWeight('Au')).toBe(196.96657);
    expect(atomicWeight('Zn')).toBe(65.38);
    expect(atomicWeight('Mo')).toBe(95.95);
    expect(chemicalElement('C')).toMatchObject({
      atomicNumber: 6,
      name: 'Carbon',
      weight: 12.011,
      interval: [12.0096, 12.0116],
      phase: 'solid',
      density: 2.2,
    });
  });

  it('has the symbols of the nuclides in their order', () => {
    expect(ELEMENTS.map(({ symbol }) => symbol)).toEqual(ELEMENT_SYMBOLS);
    expect(ELEMENTS.map(({ atomicNumber }) => atomicNumber)).toEqual(
      ELEMENTS.map((_, index) => index + 1),
    );
  });

  it('flags the fourteen elements whose weight is an interval, and brackets the abridged one', () => {
    const varying = ELEMENTS.filter(({ interval }) => interval !== null);
    // CIAAW 2021, table 1.
    expect(varying.map(({ symbol }) => symbol).join(' ')).toBe(
      'H Li B C N O Mg Si S Cl Ar Br Tl Pb',
    );
    for (const { symbol, weight, weightUncertainty, interval } of varying) {
      expect(interval?.[0], symbol).toBeLessThan(interval?.[1] ?? 0);
      // The abridged value with its uncertainty covers the whole interval, to the digits printed.
      const reach = (weightUncertainty ?? 0) * 1.01;
      expect((weight ?? 0) - reach, symbol).toBeLessThanOrEqual(interval?.[0] ?? 0);
      expect((weight ?? 0) + reach, symbol).toBeGreaterThanOrEqual(interval?.[1] ?? 0);
    }
  });

  it('agrees with the masses and the composition of the isotopes, an independent route', () => {
    let compared = 0;
    for (const { symbol, weight, weightUncertainty } of ELEMENTS) {
      const isotopes = naturalIsotopes(symbol);
      if (weight === null || isotopes.length === 0) continue;
      const composed = isotopes.reduce(
        (sum, { atomicMass, abundance }) => sum + atomicMass * (abundance ?? 0),
        0,
      );
      // Ten years lie between the compositions (2009) and the weights (2021).
      const bound = Math.max(1.5e-4 * weight, weightUncertainty ?? 0);
      expect(Math.abs(composed - weight), symbol).toBeLessThan(bound);
      compared += 1;
    }
    expect(compared).toBe(84);
  });

  it('gives densities to solids and liquids alone', () => {
    for (const { symbol, phase, density } of ELEMENTS) {
      if (phase === 'gas' || phase === 'unknown') expect(density, symbol).toBeNull();
      // Lithium is the lightest solid, osmium the densest.
      else if (density !== null) {
        expect(density, symbol).toBeGreaterThanOrEqual(0.534);
        expect(density, symbol).toBeLessThanOrEqual(22.57);
      }
    }
    expect(elementDensity('Be')).toBe(1.848);
    expect(elementDensity('Hg')).toBe(13.546);
    expectRelative(elementDensity('Al'), 2.699, 1e-4);
  });
});

describe('refusals', () => {
  it.each([
    ['au', 'did you mean Au (gold)?'],
    ['CA', 'did you mean Ca (calcium)?'],
    ['Gold', 'write Au.'],
    ['aluminum', 'write Al.'],
    ['deuterium', 'write H-2.'],
    ['C-12', 'for the natural element write C.'],
    ['12C', 'for the natural element write C.'],
    ['Xx', 'write its symbol, as in Ca.'],
    ['', 'write its symbol, as in Ca.'],
    ['constructor', 'write its symbol, as in Ca.'],
  ])('%s: %s', (symbol, mend) => {
    expect(refusal(() => chemicalElement(symbol))).toContain(mend);
  });

  it('says that a gas has no density and what to give instead', () => {
    for (const gas of ['H', 'N', 'Ar']) {
      expect(refusal(() => elementDensity(gas))).toContain('give its pressure and temperature');
    }
    expect(refusal(() => elementDensity('Fm'))).toContain('give the density of your material');
  });

  it('says that technetium has no standard weight', () => {
    expect(refusal(() => atomicWeight('Tc'))).toContain('Name a nuclide');
  });
});
