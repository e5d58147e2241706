import { expect, test } from 'vitest';
import { guessColumns, unitIn } from '#src/features/case/table/model/columns.ts';
import { cutTable, readRows, thinned } from '#src/features/case/table/model/read-table.ts';
import type { Mends } from '#src/features/case/table/model/read-table.ts';
import type { Layout } from '#src/features/case/table/model/layout.ts';

function read(text: string, chosen: Partial<Layout> = {}, mends: Partial<Mends> = {}) {
  const raw = cutTable(text, chosen);
  const decided = { sorted: false, leftOut: false, ...mends };
  return { raw, ...readRows(raw, guessColumns(raw), decided) };
}

const ROWS = [
  [0, -10],
  [0.5, -7.5],
  [1, -0.25],
  [2, 0.001],
] as const;

const written = (separator: string, comma = false): string =>
  ROWS.map((row) =>
    row.map((x) => (comma ? `${x}`.replace('.', ',') : `${x}`)).join(separator),
  ).join('\n');

test.each([
  ['tabs', '\t', false],
  ['tabs and decimal commas', '\t', true],
  ['semicolons', ';', false],
  ['semicolons and decimal commas', '; ', true],
  ['commas', ',', false],
  ['commas and blanks', ', ', false],
  ['blanks', '   ', false],
  ['blanks and decimal commas', '  ', true],
] as const)('columns parted by %s give the same rows', (_, separator, comma) => {
  const { rows, faults, raw } = read(written(separator, comma));
  expect(rows).toEqual(ROWS);
  expect(faults).toEqual([]);
  expect(raw.refused).toBeNull();
});

test('a comma that parts the columns is never a decimal sign', () => {
  expect(read('0,5\n1,6\n2,7\n3,8').rows).toEqual([
    [0, 5],
    [1, 6],
    [2, 7],
    [3, 8],
  ]);
});

test('a byte-order mark, a header, remarks, empty lines and the ends of lines of every system are passed over', () => {
  for (const end of ['\n', '\r\n', '\r']) {
    const text = ['\ufeff# made by hand', 'r (fm),V [MeV]', '', ...written(',').split('\n'), ''];
    const { rows, faults, raw } = read(text.join(end));
    expect(rows).toEqual(ROWS);
    expect(faults).toEqual([]);
    expect(raw.header?.map((name, i) => unitIn(name, i === 0 ? 'length' : 'energy'))).toEqual([
      'fm',
      'MeV',
    ]);
  }
});

test('the names above find the columns, whichever way round they stand', () => {
  const text = 'i;V/eV;r/pm\n1;-3;0\n2;-2;1\n3;-1;2';
  expect(guessColumns(cutTable(text))).toEqual({ r: 2, V: 1 });
  expect(read(text).rows).toEqual([
    [0, -3],
    [1, -2],
    [2, -1],
  ]);
});

test('exponents of every spelling and a printed minus sign are numbers', () => {
  expect(read('0 1e3\n.5 1.5D-2\n1. \u22122E+1').rows).toEqual([
    [0, 1000],
    [0.5, 0.015],
    [1, -20],
  ]);
});

test('another separator than the text has leaves one column, and no row', () => {
  const { raw, rows, faults } = read(written(';'), { separator: 'tab' });
  expect(raw.refused ?? `${raw.columns}`).toMatch(/No line of the text holds a number|^1$/);
  expect(rows).toEqual([]);
  expect(faults.every(({ message }) => message.length > 0)).toBe(true);
});

test.each([
  ['an empty cell', '0;1\n1;\n2;3', 2, /V is no number/],
  ['a missing cell', '0;1\n1;2\n2', 3, /has 1 column; V is missing/],
  ['a word', '0 1\n1 abc\n2 3', 2, /“abc” for V is no number/],
  ['not a number', '0 1\n1 NaN\n2 3', 2, /“NaN”/],
  ['infinity', '0 1\n1 inf\n2 3', 2, /“inf”/],
  ['a number beyond double precision', '0 1\n1 1e999\n2 3', 2, /“1e999”/],
  ['a separator of thousands', '0 1\n1 1,234.5\n2 3', 2, /“1,234.5”/],
  ['a distance below zero', '-1 1\n0 2\n1 3', 1, /negative/],
  ['the same r twice', '0 1\n1 2\n1 3\n2 4', 3, /r = 1 stands there twice; r must rise/],
  ['r that falls back', '0 1\n2 2\n1 3\n3 4', 3, /r = 1 comes after 2; r must rise/],
])('%s is a fault of its line, in words', (_, text, line, message) => {
  const { faults } = read(text);
  expect(faults.map((fault) => fault.line)).toEqual([line]);
  expect(faults[0]?.message).toMatch(message);
});

test('lines are counted as an editor counts them, with the header, remarks and empty ones', () => {
  expect(read('r V\n# remark\n\n0 1\n1 x\n2 3').faults.map(({ line }) => line)).toEqual([5]);
});

test('a falling table only wants sorting; with r twice sorting does not mend it', () => {
  const falling = '3 1\n2 2\n1 3\n0 4';
  const before = read(falling);
  expect(before.unsorted).toBe(true);
  expect(before.faults).toHaveLength(3);
  const after = read(falling, {}, { sorted: true });
  expect(after.faults).toEqual([]);
  expect(after.rows).toEqual([
    [0, 4],
    [1, 3],
    [2, 2],
    [3, 1],
  ]);
  expect(read('1 1\n0 2\n1 3', {}, { sorted: true }).faults).toHaveLength(1);
});

test('lines that are no row are left out on request, each named, and the others stay as they are', () => {
  const text = '0 -10\n1 oops\n2 -1\n-3 0\n2 -1\n4 -0.5\n5 -0.1';
  const before = read(text);
  expect(before.faults.map(({ line }) => line)).toEqual([2, 4, 5]);
  expect(before.leavable).toEqual(before.faults);
  const after = read(text, {}, { leftOut: true });
  expect(after.faults).toEqual([]);
  expect(after.leavable).toEqual(before.leavable);
  expect(after.rows).toEqual([
    [0, -10],
    [2, -1],
    [4, -0.5],
    [5, -0.1],
  ]);
});

test('rows out of order are sorted, never left out, and both mends go together', () => {
  const text = '0 -10\n3 -2\n1 -5\nx -9\n3 -7\n4 -1';
  const left = read(text, {}, { leftOut: true });
  expect(left.leavable.map(({ line }) => line)).toEqual([4]);
  expect(left.faults.map(({ message }) => message)).toEqual([
    'r = 1 comes after 3; r must rise from row to row.',
  ]);
  expect(left.unsorted).toBe(true);
  const both = read(text, {}, { leftOut: true, sorted: true });
  expect(both.faults).toEqual([]);
  // Sorted, the second row at r = 3 is seen to stand there twice; the first of the text is kept.
  expect(both.leavable.map(({ line }) => line)).toEqual([4, 5]);
  expect(both.rows).toEqual([
    [0, -10],
    [1, -5],
    [3, -2],
    [4, -1],
  ]);
});

test('the sign that is not the decimal one is refused with both things it may mean, never dropped', () => {
  const points = read('0;1,5\n1;1.234\n2;0,5', { decimal: 'comma' });
  expect(points.rows).toEqual([
    [0, 1.5],
    [2, 0.5],
  ]);
  expect(points.faults).toEqual([
    {
      line: 2,
      message:
        '“1.234” for V has a point where the decimal sign is a comma: write 1,234 or 1234, whichever it is.',
    },
  ]);
  const commas = read('0;1.5\n1;-1,5\n2;0.5');
  expect(commas.raw.layout.decimal).toBe('point');
  expect(commas.faults.map(({ message }) => message)).toEqual([
    '“-1,5” for V has a comma where the decimal sign is a point: write -1.5 or -15, whichever it is.',
  ]);
});

test('commas that may all separate thousands are asked about; one that cannot settles it, and so does a choice', () => {
  const thousands = '0 -4,567\n1 -3,456\n2 -2,345\n3 -1,234';
  expect(read(thousands).raw.ambiguous).toBe('-4,567');
  expect(read(`${thousands}\n4 -0,123`).raw.ambiguous).toBeNull();
  expect(read(`${thousands}\n4,5 -1,000`).raw.ambiguous).toBeNull();
  const chosen = read(thousands, { decimal: 'comma' });
  expect(chosen.raw.ambiguous).toBeNull();
  expect(chosen.rows[0]).toEqual([0, -4.567]);
  expect(read(thousands, { decimal: 'point' }).faults).toHaveLength(4);
  expect(read('0 -4.567\n1 -3.456').raw.ambiguous).toBeNull();
});

test.each([
  [
    'a page of a paper',
    'Scattering of slow neutrons\nby hydrogen. The cross section was measured.',
  ],
  ['a table of words', 'name;colour\niron;grey\ngold;yellow'],
  ['mark-up', '<table><tr><td>r</td><td>V</td></tr></table>'],
  ['an object', '{"r": [], "V": []}'],
])('%s is no table, and said to be none', (_, text) => {
  expect(cutTable(text).refused).toBe('No line of the text holds a number.');
  expect(cutTable(text).lines).toEqual([]);
});

test('a text with numbers here and there gives no row, and a reason for each line', () => {
  const { rows, faults } = read('On 3 May the beam\nwas 25 MeV wide\nand 4 m long');
  expect(rows).toEqual([]);
  expect(faults).toHaveLength(3);
});

test('a million rows and a file that is no text are refused in words', () => {
  expect(cutTable('1 2\n'.repeat(1e6)).refused).toMatch(
    /characters; at most \d+ are read\. Thin the table out/,
  );
  expect(cutTable('1 2\n'.repeat(150_000)).refused).toMatch(/lines; at most \d+ are read\. Thin/);
  expect(cutTable('PK\u0003\u0000\u0000').refused).toMatch(/no text/);
  expect(cutTable('words alone\nand more of them').refused).toMatch(/holds a number/);
});

test('thinning keeps the first and the last row, the order, and no more than it may', () => {
  for (const count of [5, 2000, 2001, 3999, 4000, 99_999]) {
    const rows = Array.from({ length: count }, (_, i): [number, number] => [i, -i]);
    const kept = thinned(rows, 2000);
    expect(kept.length).toBeLessThanOrEqual(2000);
    expect(kept.length).toBeGreaterThanOrEqual(Math.min(count, 1000));
    expect(kept[0]).toEqual(rows[0]);
    expect(kept.at(-1)).toEqual(rows.at(-1));
    expect(kept.every(([r], i) => i === 0 || r > (kept[i - 1]?.[0] ?? NaN))).toBe(true);
  }
});
