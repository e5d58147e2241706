import { describe, expect, test } from 'vitest';
import type { FormInfo } from '#shared/contracts/forms.ts';
import { DEFAULT_DOCUMENT } from '#src/features/case/model/default-document.ts';
import type { Draft } from '#src/features/case/model/editor.ts';
import { withAngleKind, withAngleUnit } from '#src/features/case/model/table.ts';
import {
  addTerm,
  changedForm,
  defaultTerm,
  removeTerm,
  setParameter,
} from '#src/features/case/model/terms.ts';

const WELL: FormInfo = {
  key: 'squareWell',
  label: 'Square well',
  formula: '',
  transformFormula: '',
  source: '',
  parameters: [
    {
      key: 'V0',
      label: 'depth',
      symbol: 'V_0',
      dimension: 'energy',
      default: { value: -1, unit: 'eV' },
      description: '',
    },
    {
      key: 'W0',
      label: 'absorption',
      symbol: 'W_0',
      dimension: 'energy',
      optional: true,
      default: { value: 0, unit: 'eV' },
      description: '',
    },
    {
      key: 'R',
      label: 'radius',
      symbol: 'R',
      dimension: 'length',
      default: { value: 2, unit: 'angstrom' },
      description: '',
    },
  ],
};

describe('terms', () => {
  test('a new term has the defaults of the register, without what may be left out', () => {
    expect(defaultTerm(WELL)).toEqual({
      form: 'squareWell',
      V0: { value: -1, unit: 'eV' },
      R: { value: 2, unit: 'angstrom' },
    });
  });

  test('another form keeps what both call by the same names and the person had set', () => {
    const from = { ...WELL, key: 'x' };
    const term = { form: 'x', V0: { value: -7, unit: 'keV' }, W0: { value: -1, unit: 'eV' } };
    expect(changedForm(term, from, WELL)).toEqual({
      form: 'squareWell',
      V0: { value: -7, unit: 'keV' },
      W0: { value: -1, unit: 'eV' },
      R: { value: 2, unit: 'angstrom' },
    });
    // A range is no diffuseness, and what was never touched is no wish.
    const ranged = {
      ...WELL,
      parameters: WELL.parameters.map((p) => ({ ...p, label: 'range' })),
    };
    expect(changedForm(term, ranged, WELL)).toEqual(defaultTerm(WELL));
    expect(changedForm(defaultTerm(from), from, { ...WELL, key: 'y' })).toEqual({
      ...defaultTerm(WELL),
      form: 'y',
    });
    const charge = { ...WELL, parameters: [{ ...WELL.parameters[0]!, dimension: 'number' }] };
    expect(changedForm(term, charge, WELL)['V0']).toEqual({ value: -1, unit: 'eV' });
  });

  test('a removed term takes its texts along, and those of later terms move up', () => {
    const three = [1, 2].reduce(
      (document) => addTerm(document, defaultTerm(WELL)),
      DEFAULT_DOCUMENT,
    );
    const at = (index: number, key: string) => `/interaction/terms/${index}/${key}`;
    const draft: Draft = {
      title: '',
      tags: [],
      document: { ...three, entered: { [at(0, 'a')]: 'zero', [at(2, 'R')]: 'two' } },
      open: {
        [at(1, 'R')]: { text: 'one', problem: 'x' },
        [at(2, 'V0')]: { text: 't', problem: 'y' },
      },
    };
    const removed = removeTerm(draft, 1);
    expect(removed.document.interaction.terms).toHaveLength(2);
    expect(removed.document.entered).toEqual({ [at(0, 'a')]: 'zero', [at(1, 'R')]: 'two' });
    expect(removed.open).toEqual({ [at(1, 'V0')]: { text: 't', problem: 'y' } });
  });

  test('an emptied parameter is left out', () => {
    const document = setParameter(DEFAULT_DOCUMENT, 0, 'a', undefined);
    expect(document.interaction.terms[0]).toEqual({
      form: 'yukawa',
      V0: { value: -10, unit: 'eV' },
    });
  });
});

describe('the table of angles', () => {
  test('goes through radians and back without a lost digit, and takes the golden rule along', () => {
    const there = withAngleUnit(DEFAULT_DOCUMENT, 'rad');
    expect(there.angles).toMatchObject({ unit: 'rad', from: 0, count: 181 });
    expect(there.goldenRule?.theta).toBe(60 * (Math.PI / 180));
    expect(withAngleUnit(there, 'deg')).toEqual(DEFAULT_DOCUMENT);
  });

  test('becomes a list that spans the same range, and steps again', () => {
    const list = withAngleKind(DEFAULT_DOCUMENT, 'list');
    const { angles } = list;
    expect(angles && 'values' in angles && [angles.values.length, angles.values.at(-1)]).toEqual([
      13, 180,
    ]);
    expect(withAngleKind(list, 'steps').angles).toEqual(DEFAULT_DOCUMENT.angles);
  });
});
