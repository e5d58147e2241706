import { describe, expect, it } from 'vitest';
import { DomainError } from '#shared/errors.ts';
import {
  ELEMENT_SYMBOLS,
  NUCLIDES,
  NUCLIDES_EDITION,
  atomicMassEnergy,
  atomicNumber,
  massMetBy,
  naturalIsotopes,
  nuclearMassEnergy,
  nuclide,
} from '#server/physics/tables/nuclides.ts';
import { species } from '#server/physics/tables/species.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const U = 931494103.72;

function message(action: () => unknown): string {
  try {
    action();
  } catch (error) {
    if (error instanceof DomainError && error.code === 'invalidInput') return error.message;
    throw error;
  }
  throw new Error('Nothing was refused.');
}

describe('the table of nuclides', () => {
  it('holds the values of its edition', () => {
    expect(NUCLIDES_EDITION).toBe('AME2012');
    expect(nuclide('C-12').atomicMass).toBe(12);
    // NIST, Atomic Weights and Isotopic Compositions 4.1.
    expect(nuclide('Au-197')).toMatchObject({ atomicMass: 196.96656879, abundance: 1, spin: 1.5 });
    expect(nuclide('Ca-40')).toMatchObject({
      symbol: 'Ca',
      atomicNumber: 20,
      massNumber: 40,
      spin: 0,
    });
    expect(naturalIsotopes('C').map(({ abundance }) => abundance)).toEqual([0.9893, 0.0107]);
    expect(nuclide('Co-60').abundance).toBeNull();
  });

  it('has the spins that identical particles need', () => {
    const spins = [
      'H-1',
      'H-2',
      'He-3',
      'He-4',
      'Li-6',
      'Li-7',
      'B-10',
      'C-12',
      'O-16',
      'V-51',
      'Hg-199',
    ];
    expect(spins.map((name) => nuclide(name).spin)).toEqual([
      0.5, 1, 0.5, 0, 1, 1.5, 3, 0, 0, 3.5, 0.5,
    ]);
    expect(naturalIsotopes('U').every(({ spin }) => spin !== null)).toBe(true);
  });

  it('gives no spin of the wrong kind: half-integer exactly for odd mass numbers, 0 for even-even', () => {
    for (const { name, spin, atomicNumber: z, massNumber: a } of NUCLIDES) {
      if (spin !== null) expect((2 * spin) % 2, name).toBe(a % 2);
      if (z % 2 === 0 && a % 2 === 0) expect(spin, name).toBe(0);
    }
  });

  it('has compositions that add up to one, each of an element known by its number', () => {
    expect(ELEMENT_SYMBOLS).toHaveLength(118);
    const natural = ELEMENT_SYMBOLS.map((symbol) => naturalIsotopes(symbol)).filter(
      (list) => list.length > 0,
    );
    expect(natural.length).toBeGreaterThan(80);
    for (const isotopes of natural) {
      expectRelative(
        isotopes.reduce((sum, { abundance }) => sum + (abundance ?? 0), 0),
        1,
        1e-9,
      );
    }
  });

  it('has masses within a tenth of the mass number, or 1e-3 of it for the heavy', () => {
    for (const { name, atomicMass, massNumber } of NUCLIDES) {
      expect(Math.abs(atomicMass - massNumber), name).toBeLessThan(
        Math.max(0.12, 1.1e-3 * massNumber),
      );
    }
  });
});

describe('masses', () => {
  it('subtracts the electrons for a charged projectile and keeps them for a neutron', () => {
    const calcium = nuclide('Ca-40');
    expectRelative(atomicMassEnergy(calcium), 39.962590863 * U, 1e-15);
    expectRelative(nuclearMassEnergy(calcium), 39.962590863 * U - 20 * 510998.95069, 1e-15);
    expect(massMetBy(calcium, 2)).toBe(nuclearMassEnergy(calcium));
    expect(massMetBy(calcium, -1)).toBe(nuclearMassEnergy(calcium));
    expect(massMetBy(calcium, 0)).toBe(atomicMassEnergy(calcium));
  });

  it.each([
    ['H-1', 'proton'],
    ['H-2', 'deuteron'],
    ['H-3', 'triton'],
    ['He-3', 'helion'],
    ['He-4', 'alpha'],
  ])('%s has the mass of the %s, so that both ways of writing one collision agree', (name, key) => {
    expect(nuclearMassEnergy(nuclide(name))).toBe(species(key).mass);
  });
});

describe('names', () => {
  it.each(['Ca40', 'ca-40', '40Ca', '⁴⁰Ca', 'CA-40', 'Ca 40', 'ca40'])(
    '%s is refused with the right spelling',
    (name) => {
      expect(message(() => nuclide(name))).toContain('write Ca-40');
    },
  );

  it('names the natural isotopes where the mass number is missing or wrong', () => {
    expect(message(() => nuclide('Li'))).toContain('Li-6, Li-7');
    expect(message(() => nuclide('Li-60'))).toContain('Li-6, Li-7');
    expect(message(() => nuclide('Xx-1'))).toContain('as in Ca-40');
    expect(message(() => nuclide(''))).toContain('as in Ca-40');
    expect(message(() => nuclide('__proto__'))).toContain('not a nuclide');
  });

  it('finds atomic numbers and mends the case of a symbol', () => {
    expect(atomicNumber('Au')).toBe(79);
    expect(message(() => atomicNumber('au'))).toContain('did you mean Au?');
    expect(message(() => atomicNumber('Qq'))).toContain('is not an element');
  });
});
