import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DomainError } from '#shared/errors.ts';
import { atomicWeight } from '#server/physics/tables/elements.ts';
import { countOf, parseFormula } from '#server/physics/tables/formula.ts';
import { nuclide } from '#server/physics/tables/nuclides.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { refusal } from './refusal.ts';

const counts = (text: string) =>
  Object.fromEntries(parseFormula(text).parts.map(({ name, count }) => [name, count]));

describe('parseFormula', () => {
  it.each([
    ['C', { C: 1 }],
    ['C10H8O4', { C: 10, H: 8, O: 4 }],
    ['CD2', { C: 1, 'H-2': 2 }],
    ['3He', { 'He-3': 1 }],
    ['³He', { 'He-3': 1 }],
    ['He-3', { 'He-3': 1 }],
    ['D2O', { 'H-2': 2, O: 1 }],
    ['2H2', { 'H-2': 2 }],
    ['T2', { 'H-3': 2 }],
    ['HDO', { H: 1, 'H-2': 1, O: 1 }],
    ['H₂O', { H: 2, O: 1 }],
    ['[10B]4C', { 'B-10': 4, C: 1 }],
    ['[B-10]4C', { 'B-10': 4, C: 1 }],
    ['¹⁰B₄C', { 'B-10': 4, C: 1 }],
    ['Li-6F', { 'Li-6': 1, F: 1 }],
    ['Al2(SO4)3', { Al: 2, S: 3, O: 12 }],
    ['CaSO4·2H2O', { Ca: 1, S: 1, O: 6, H: 4 }],
    ['CuSO4*5H2O', { Cu: 1, S: 1, O: 9, H: 10 }],
    ['Fe0.95O', { Fe: 0.95, O: 1 }],
    ['[Co(NH3)6]Cl3', { Co: 1, N: 6, H: 18, Cl: 3 }],
    ['{[CH2]2}3', { C: 6, H: 12 }],
    ['CO', { C: 1, O: 1 }],
    ['Co', { Co: 1 }],
    ['CHCl3', { C: 1, H: 1, Cl: 3 }],
    ['C22H10N2O5', { C: 22, H: 10, N: 2, O: 5 }],
  ])('%s', (text, expected) => {
    expect(counts(text)).toEqual(expected);
  });

  it('gives molar masses of handbooks', () => {
    // CRC Handbook: water 18.015, polyethylene unit 14.027, PET unit 192.17, gypsum 172.17, heavy water 20.028 g/mol.
    expectRelative(parseFormula('H2O').molarMass, 18.015, 1e-5);
    expectRelative(parseFormula('CH2').molarMass, 14.027, 1e-5);
    expectRelative(parseFormula('C10H8O4').molarMass, 192.17, 5e-5);
    expectRelative(parseFormula('CaSO4·2H2O').molarMass, 172.17, 5e-5);
    expectRelative(parseFormula('D2O').molarMass, 20.028, 5e-5);
    expect(parseFormula('3He').molarMass).toBe(nuclide('He-3').atomicMass);
    expect(parseFormula('Au').molarMass).toBe(atomicWeight('Au'));
  });

  it('counts atoms and gives the parts with their masses', () => {
    const water = parseFormula('D2O');
    expect(water.atoms).toBe(3);
    expect(water.parts[0]).toEqual({
      name: 'H-2',
      symbol: 'H',
      massNumber: 2,
      count: 2,
      molarMass: nuclide('H-2').atomicMass,
    });
    expect(countOf(water, 'O')).toBe(1);
    expect(refusal(() => countOf(water, 'H'))).toBe('`D2O` contains no H: choose one of H-2, O.');
  });

  it('is linear: a group repeated n times weighs n times as much, in any order', () => {
    const symbols = fc.constantFrom('H', 'C', 'O', 'Si', 'Au', 'U', 'D', '[10B]');
    const atoms = fc.array(fc.tuple(symbols, fc.integer({ min: 1, max: 40 })), {
      minLength: 1,
      maxLength: 8,
    });
    fc.assert(
      fc.property(atoms, fc.integer({ min: 2, max: 50 }), (list, times) => {
        const write = (items: [string, number][]) =>
          items.map(([symbol, count]) => `${symbol}${count}`).join('');
        const once = parseFormula(write(list)).molarMass;
        expectRelative(parseFormula(`(${write(list)})${times}`).molarMass, times * once, 1e-13);
        expectRelative(parseFormula(write([...list].reverse())).molarMass, once, 1e-13);
      }),
    );
  });
});

describe('refusals', () => {
  it.each([
    ['', 'it is empty'],
    ['h2o', 'begins with a capital'],
    ['NACL', 'is not an element'],
    ['Xx2', 'Co cobalt'],
    ['10B4C', 'write an isotope as [10B]4C'],
    ['2H2O', 'write an isotope as [10B]4C or D2O'],
    ['Fe2O3)', 'closes nothing'],
    ['(CH2', 'is not closed with )'],
    ['(CH2]3', 'is not closed with )'],
    ['()', 'these brackets are empty'],
    ['H0', 'a count lies between'],
    ['H9999999', 'a count lies between'],
    ['SO4-2', 'leave out charges'],
    ['Na+', 'leave out charges'],
    ['H2 O', 'leave out spaces'],
    ['CuSO4.5H2O', 'Write it as 4·5H2O'],
    ['C..H', 'join parts with a raised dot'],
    ['CaSO4·', 'an element symbol is expected here'],
    ['[3D]2', 'write D alone'],
    ['Li-60F', 'Li-6, Li-7'],
    ['[5B]', 'B-10, B-11'],
    ['TcO2', 'Name a nuclide'],
    ['H2O!', 'an element symbol is expected here'],
    ['__proto__', 'an element symbol is expected here'],
    ['C'.repeat(201), 'at most 200 characters'],
    [`${'('.repeat(60)}C${')'.repeat(60)}`, 'nest at most 8 deep'],
  ])('%s: %s', (text, mend) => {
    expect(refusal(() => parseFormula(text))).toContain(mend);
  });

  it('are words for any text, never another exception', () => {
    const pieces = fc.constantFrom(
      'H',
      'D',
      'e',
      '2',
      '0',
      '.',
      '(',
      ')',
      '[',
      ']',
      '·',
      '-',
      '³',
      '₂',
      ' ',
      '🜁',
    );
    fc.assert(
      fc.property(
        fc.oneof(
          fc.string(),
          fc.array(pieces).map((list) => list.join('')),
        ),
        (text) => {
          try {
            const { molarMass, parts } = parseFormula(text);
            expect(molarMass).toBeGreaterThan(0);
            expect(parts.length).toBeGreaterThan(0);
          } catch (error) {
            if (!(error instanceof DomainError)) throw error;
            expect(error.code).toBe('invalidInput');
          }
        },
      ),
      { numRuns: 500 },
    );
  });
});
