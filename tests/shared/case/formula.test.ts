import { describe, expect, it } from 'vitest';
import {
  freeNames,
  inOrder,
  likelyValue,
  parametersFor,
} from '#src/features/case/expression/model/names.ts';
import { placeOf } from '#src/features/case/expression/model/place.ts';
import {
  kindOf,
  parameterText,
  readParameterText,
} from '#src/features/case/expression/model/read-parameter.ts';

const WORDS = ['r', 'pi', 'e', 'exp', 'sqrt', 'min'];
const Q = (value: number, unit: string) => ({ value, unit });

describe('names of a formula', () => {
  it('in the order in which they appear, without numbers and words it knows', () => {
    expect(freeNames('V0*exp(-r/a)/(r/a) + 2e3*B_2*1.5E-2', WORDS)).toEqual(['V0', 'a', 'B_2']);
    expect(freeNames('2*pi*e', WORDS)).toEqual([]);
    expect(freeNames('3e2x', WORDS)).toEqual(['x']);
  });

  it('new ones begin with a likely value, in the units of the case', () => {
    expect(likelyValue('V0', undefined)).toEqual(Q(1, 'eV'));
    expect(likelyValue('R', { length: 'fm', energy: 'MeV' })).toEqual(Q(1, 'fm'));
    expect(likelyValue('g', { length: 'fm' })).toEqual(Q(1, 'MeV fm'));
    expect(likelyValue('n', undefined)).toBe(1);
  });

  it('while a name is typed nothing is lost and nothing is left behind', () => {
    const typed = ['V', 'V0', 'V0*', 'V0*e', 'V0*exp(-r/a)'];
    const end = typed.reduce((before, text) => parametersFor(text, WORDS, before, undefined), {});
    expect(end).toEqual({ V0: Q(1, 'eV'), a: Q(1, 'angstrom') });
    const given = { ...end, a: Q(3, 'nm') };
    const without = parametersFor('V0', WORDS, given, undefined);
    expect(without).toEqual({ V0: Q(1, 'eV'), a: Q(3, 'nm') });
    expect(inOrder('V0', WORDS, without)).toEqual([
      { name: 'V0', value: Q(1, 'eV'), used: true },
      { name: 'a', value: Q(3, 'nm'), used: false },
    ]);
    expect(parametersFor('V0*exp(-r/a)', WORDS, without, undefined)).toEqual(given);
  });
});

describe('what is typed for a parameter', () => {
  const CASES: [string, unknown][] = [
    ['-10 eV', Q(-10, 'eV')],
    ['1.5 Å', Q(1.5, 'angstrom')],
    ['14.4 eV Å', Q(14.4, 'eV angstrom')],
    ['3 fm2', Q(3, 'fm2')],
    ['2 1/angstrom', Q(2, '1/angstrom')],
    ['5 eV angstrom2', Q(5, 'eV angstrom2')],
    ['30 deg', Q(30, 'deg')],
    ['2', 2],
    ['1e-3', 1e-3],
  ];
  it.each(CASES)('%s', (text, value) => {
    expect(readParameterText(text)).toEqual({ value });
  });

  it('units a potential has no use for are refused in words', () => {
    for (const text of ['3 s', '2 K', '1 furlong', 'ten', '']) {
      expect(readParameterText(text)).toHaveProperty('problem');
    }
    const seconds = readParameterText('3 s');
    expect('problem' in seconds && seconds.problem).toMatch(/energies and lengths/);
  });

  it('what was typed is shown as long as it means the value', () => {
    expect(parameterText(Q(10, 'eV'), '1e1 eV')).toBe('1e1 eV');
    expect(parameterText(Q(10, 'eV'), '9 eV')).toBe('10 eV');
    expect(parameterText(2.5, undefined)).toBe('2.5');
    expect([Q(1, 'eV'), Q(1, 'MeV fm'), Q(1, '1/fm'), 3].map(kindOf)).toEqual([
      'energy',
      'energy times length',
      '1/fm',
      'plain number',
    ]);
  });
});

describe('the place of a fault', () => {
  it('is the character it names', () => {
    expect(placeOf('Character 4: something.', 'V0*q')).toEqual({
      before: 'V0*',
      at: 'q',
      after: '',
    });
    const long = `${'V0+'.repeat(30)}q`;
    const place = placeOf(`Character ${long.length}: x`, long);
    expect(place?.at).toBe('q');
    expect(place?.before.startsWith('…')).toBe(true);
  });

  it('is none where no character is named or it is gone', () => {
    expect(placeOf('The formula is empty.', 'V0')).toBeNull();
    expect(placeOf('Character 9: x', 'V0')).toBeNull();
  });
});
