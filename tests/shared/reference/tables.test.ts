import { describe, expect, it } from 'vitest';
import { csvOf } from '#src/lib/csv.ts';
import { aligned } from '#src/features/reference/model/align.ts';
import { fileRows, lineOf, type Column } from '#src/features/reference/model/columns.ts';
import { cutOf, rowsOf, seriesOf } from '#src/features/reference/model/curve.ts';
import { percent, spinText } from '#src/features/reference/model/words.ts';

interface Row {
  name: string;
  mass: number;
  error?: number;
}
const columns: Column<Row>[] = [
  { key: 'name', title: 'Name', names: true, text: ({ name }) => name },
  {
    key: 'mass',
    title: 'm',
    spoken: 'mass',
    unit: 'u',
    number: ({ mass, error }) => ({ value: mass, uncertainty: error }),
  },
];
const rows: Row[] = [
  { name: 'one', mass: 1.5, error: 0.02 },
  { name: 'two, "b"', mass: 200 },
];

describe('numbers in a column', () => {
  it('have their decimal points, or where one would be, in one line', () => {
    const texts = aligned(['1.008', '−12.5(3)', '200', '', '0.0001(2)', '5(1)']);
    const places = texts
      .filter((text) => text !== '')
      .map((text) => {
        const at = text.search(/[.(]/);
        return at < 0 ? text.trimEnd().length : at;
      });
    expect(new Set(places).size).toBe(1);
    expect(new Set(texts.filter((text) => text !== '').map(({ length }) => length)).size).toBe(1);
    expect(texts[3]).toBe('');
  });
});

describe('a file of a table', () => {
  it('has a row of names, a row of units, and uncertainties in a column of their own', () => {
    expect(fileRows(columns, rows)).toEqual([
      ['Name', 'mass', 'standard uncertainty of mass'],
      ['', 'u', 'u'],
      ['one', '1.5', '0.02'],
      ['two, "b"', '200', ''],
    ]);
  });

  it('quotes what a spreadsheet would split, and defuses what it would compute', () => {
    expect(csvOf([['a,b', 'c"d', '=1+1', '-5']])).toBe('"a,b","c""d",\'=1+1,-5\r\n');
  });

  it('one row is copied with names and units', () => {
    expect(lineOf(columns, { name: 'one', mass: 1.5, error: 0.02 })).toBe('one\tmass 1.50(2) u');
  });
});

describe('a curve', () => {
  const x = Array.from({ length: 100 }, (_, i) => (i + 1) / 100);
  const steep = { x, re: x.map((r) => -1 / r) };
  const flat = { x, re: x.map(() => -3) };

  it('that rises without end is cut on a linear scale only', () => {
    const cut = cutOf(steep);
    if (cut === null) throw new Error('not cut');
    const [linear] = seriesOf(steep, 'V', 'linear');
    const [log] = seriesOf(steep, 'V', 'log');
    expect(linear?.points[0]?.[1]).toBeNull();
    expect(log?.points[0]?.[1]).toBe(100);
    expect(linear?.points.every(([, v]) => v === null || Math.abs(v) <= cut)).toBe(true);
    expect(cutOf(flat)).toBeNull();
  });

  it('is written with all its digits and both parts', () => {
    const written = rowsOf({ x: [1], re: [-0.1], im: [2e-9] }, ['r', 'V'], ['fm', 'MeV']);
    expect(written).toEqual([
      ['r', 'Re V', 'Im V'],
      ['fm', 'MeV', 'MeV'],
      ['1', '-0.1', '2e-9'],
    ]);
  });
});

describe('words', () => {
  it('write spins and shares as the trade does', () => {
    expect([0, 0.5, 1, 3.5].map(spinText)).toEqual(['0', '1/2', '1', '7/2']);
    expect(percent(0.00187)).toBe(0.187);
    expect(percent(0.999885)).toBe(99.9885);
  });
});
