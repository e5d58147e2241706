import { describe, expect, test } from 'vitest';
import { parseQuantity } from '#shared/units/parse.ts';
import { convertQuantity } from '#src/components/convert-quantity.ts';
import { DEFAULT_DOCUMENT } from '#src/features/case/model/default-document.ts';
import type { Draft } from '#src/features/case/model/editor.ts';
import {
  outside,
  readNumberList,
  readPlainNumber,
  shownText,
  takeText,
  takeValue,
} from '#src/features/case/model/typing.ts';

const start: Draft = { title: '', tags: [], document: DEFAULT_DOCUMENT, open: {} };
const putEnergy = (document: Draft['document'], energy: Draft['document']['energy']) => ({
  ...document,
  energy,
});

function type(draft: Draft, text: string): Draft {
  const parsed = parseQuantity(text, 'energy', { unit: draft.document.energy.unit });
  const reading = parsed.ok ? { value: parsed.quantity } : { problem: parsed.message };
  return takeText(draft, '/energy', text, reading, putEnergy);
}

describe('a text in a field', () => {
  test('that is no value leaves the last valid document alone and stays as typed', () => {
    const draft = type(start, '10 kiloelectron');
    expect(draft.document).toBe(DEFAULT_DOCUMENT);
    expect(draft.open['/energy']?.text).toBe('10 kiloelectron');
    expect(draft.open['/energy']?.problem).toMatch(/energy unit/);
    expect(shownText(draft, '/energy', draft.document.energy, 'energy', {})).toBe(
      '10 kiloelectron',
    );
  });

  test('that is a value reaches the document together with what was typed', () => {
    const draft = type(type(start, '10 k'), '10 keV');
    expect(draft.open).toEqual({});
    expect(draft.document.energy).toEqual({ value: 10, unit: 'keV' });
    expect(draft.document.entered).toEqual({ '/energy': '10 keV' });
  });

  test('is shown only while it still means the value', () => {
    const draft = type(start, '1e1 keV');
    const { energy } = draft.document;
    expect(shownText(draft, '/energy', energy, 'energy', {})).toBe('1e1 keV');
    expect(shownText(draft, '/energy', { ...energy, value: 11 }, 'energy', {})).toBe('11 keV');
  });

  test('is forgotten when a value is put without one', () => {
    const draft = takeValue(type(start, '1e1 keV'), '/energy', (document) =>
      putEnergy(document, { value: 1e4, unit: 'eV' }),
    );
    expect(draft.document.entered).toBeUndefined();
    expect(shownText(draft, '/energy', draft.document.energy, 'energy', {})).toBe('10000 eV');
  });
});

test('the unit menu converts and never relabels', () => {
  expect(convertQuantity({ value: 0.1, unit: 'nm' }, 'angstrom', 'length')).toEqual({
    value: 1,
    unit: 'angstrom',
  });
  const there = convertQuantity({ value: 7.3, unit: 'MeV' }, 'hartree', 'energy');
  const back = convertQuantity(there, 'MeV', 'energy');
  expect(Math.abs(back.value / 7.3 - 1)).toBeLessThan(1e-14);
});

describe('plain numbers', () => {
  const charge = { integer: true, minimum: -200, maximum: 200, what: 'The charge' };
  test.each([
    ['', /type a number/],
    ['1.5', /whole number/],
    ['201', /at most 200/],
    ['−201', /at least −200/],
    ['3 e', /without a unit/],
    ['1e400', /too large/],
  ])('%j is refused in words', (text, message) => {
    const reading = readPlainNumber(text, charge);
    expect('problem' in reading && reading.problem).toMatch(message);
  });

  test('a typed minus is a minus', () => {
    expect(readPlainNumber('−79', charge)).toEqual({ value: -79 });
  });

  test('NaN is outside every bound', () => {
    expect(outside(NaN, { minimum: 0, what: 'x' })).not.toBeNull();
    expect(outside(NaN, { maximum: 0, what: 'x' })).not.toBeNull();
    expect(outside(0, { minimum: 0, exclusiveMinimum: true, what: 'x' })).toMatch(/above 0/);
  });
});

describe('lists of angles', () => {
  const rules = { minimum: 0, maximum: 180, what: 'An angle' };
  test('take commas, semicolons, spaces, lines and degree signs', () => {
    expect(readNumberList('0, 30;60 90°\n180', rules)).toEqual({ value: [0, 30, 60, 90, 180] });
  });
  test('name the word at fault', () => {
    const reading = readNumberList('0, 30, 181', rules);
    expect('problem' in reading && reading.problem).toMatch(/`181`.*at most 180/);
    expect('problem' in readNumberList('  ', rules)).toBe(true);
    expect('problem' in readNumberList('1 '.repeat(5001), rules)).toBe(true);
  });
});
