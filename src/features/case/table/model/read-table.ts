import { ambiguousComma, guessLayout, numberIn, plainField, splitLine } from './layout.ts';
import type { DecimalSign, Layout } from './layout.ts';

/** A pasted or uploaded text is read up to here: a text box that holds more freezes the page. */
export const MOST_TEXT = 1_000_000;
export const MOST_LINES = 100_000;

export interface TableLine {
  /** Counted from 1, as editors do. */
  line: number;
  fields: string[];
}

/** A text cut into lines and columns, nothing judged yet. */
export interface RawTable {
  layout: Layout;
  /** Names of the columns, where a line of words stands above the numbers. */
  header: string[] | null;
  columns: number;
  lines: TableLine[];
  /** Lines that hold remarks: they begin with #, %, ! or //. */
  remarks: number;
  /** A number whose comma is taken for a decimal sign by a guess that may be wrong a thousandfold. */
  ambiguous: string | null;
  /** Why the text was not read at all. */
  refused: string | null;
}

export interface LineFault {
  line: number;
  message: string;
}

export type Row = [r: number, V: number];

const REMARK = /^\s*(?:#|%|!|\/\/)\s*/;

function refused(reason: string): RawTable {
  const layout: Layout = { separator: 'space', decimal: 'point' };
  const nothing = { header: null, columns: 0, lines: [], remarks: 0, ambiguous: null };
  return { layout, ...nothing, refused: reason };
}

/** Number of fields of a line that are numbers. */
const numbersIn = (fields: readonly string[], { decimal }: Layout): number =>
  fields.filter((field) => numberIn(field, decimal) !== null).length;

/** Words above the first row of numbers; where there are several lines of them, the last with two or more. */
function headerOf(above: readonly string[], layout: Layout): string[] | null {
  const names = above
    .map((line) => splitLine(line.replace(REMARK, ''), layout.separator))
    .filter((fields) => fields.length > 1 && numbersIn(fields, layout) === 0);
  return names.at(-1) ?? null;
}

/**
 * Cuts a text into rows and columns.
 *
 * @param text as pasted or as the file holds it
 * @param chosen separator and decimal sign, where the person has chosen; else they are guessed
 */
export function cutTable(text: string, chosen: Partial<Layout> = {}): RawTable {
  if (text.length > MOST_TEXT) {
    return refused(
      `The text has ${text.length} characters; at most ${MOST_TEXT} are read. Thin the table out first.`,
    );
  }
  if (text.includes('\u0000') || text.includes('\ufffd'))
    return refused('This is no text: choose a file of plain numbers.');
  const all = text.replace(/^\ufeff/, '').split(/\r\n|\r|\n/);
  if (all.length > MOST_LINES) {
    return refused(
      `The text has ${all.length} lines; at most ${MOST_LINES} are read. Thin the table out first.`,
    );
  }
  const layout = { ...guessLayout(all), ...chosen };
  const filled = all
    .map((content, i) => ({ content, line: i + 1 }))
    .filter(({ content }) => content.trim() !== '');
  const rows = filled.filter(({ content }) => !REMARK.test(content));
  const lines = rows.map(({ content, line }) => ({
    line,
    fields: splitLine(content, layout.separator),
  }));
  const first = lines.findIndex(({ fields }) => numbersIn(fields, layout) > 0);
  const data = first < 0 ? [] : lines.slice(first);
  const start = data[0]?.line ?? Infinity;
  const above = filled.filter(({ line }) => line < start).map(({ content }) => content);
  return {
    layout,
    header: headerOf(above, layout),
    columns: data.slice(0, 1000).reduce((most, { fields }) => Math.max(most, fields.length), 0),
    lines: data,
    remarks: filled.length - rows.length,
    ambiguous:
      chosen.decimal === undefined && layout.decimal === 'comma'
        ? ambiguousComma(data.flatMap(({ fields }) => fields))
        : null,
    refused: data.length === 0 && filled.length > 0 ? 'No line of the text holds a number.' : null,
  };
}

const MARKS: Record<DecimalSign, string> = { point: '.', comma: ',' };

function fieldWords(field: string, name: string, decimal: DecimalSign): string {
  const shown = `“${field.slice(0, 24)}” for ${name}`;
  const other: DecimalSign = decimal === 'comma' ? 'point' : 'comma';
  if (numberIn(field, other) === null) return `${shown} is no number.`;
  const text = plainField(field);
  const asDecimal = text.replace(MARKS[other], MARKS[decimal]);
  return `${shown} has a ${other} where the decimal sign is a ${decimal}: write ${asDecimal} or ${text.replace(MARKS[other], '')}, whichever it is.`;
}

function fieldFault(
  line: TableLine,
  column: number,
  name: string,
  decimal: DecimalSign,
): LineFault {
  const field = line.fields[column];
  const message =
    field === undefined
      ? `has ${line.fields.length} column${line.fields.length === 1 ? '' : 's'}; ${name} is missing.`
      : fieldWords(field, name, decimal);
  return { line: line.line, message };
}

interface Found {
  row: Row;
  line: number;
}

/** The rows of two columns in the order of the text, and the lines that are none. */
function foundIn({ lines, layout }: RawTable, columns: { r: number; V: number }) {
  const { decimal } = layout;
  const found: Found[] = [];
  const unread: LineFault[] = [];
  for (const line of lines) {
    const r = numberIn(line.fields[columns.r] ?? '', decimal);
    const V = numberIn(line.fields[columns.V] ?? '', decimal);
    if (r === null) unread.push(fieldFault(line, columns.r, 'r', decimal));
    else if (V === null) unread.push(fieldFault(line, columns.V, 'V', decimal));
    else if (r < 0) unread.push({ line: line.line, message: `r = ${r} is negative.` });
    else found.push({ row: [r, V], line: line.line });
  }
  return { found, unread };
}

/** Rows whose r stands there already, and rows whose r falls back, in words. */
function orderFaults(found: readonly Found[]) {
  const twice: LineFault[] = [];
  const fallen: LineFault[] = [];
  found.forEach(({ row: [r], line }, i) => {
    const before = found[i - 1]?.row[0];
    if (before === undefined || r > before) return;
    const how = r === before ? `r = ${r} stands there twice` : `r = ${r} comes after ${before}`;
    const fault = { line, message: `${how}; r must rise from row to row.` };
    (r === before ? twice : fallen).push(fault);
  });
  return { twice, fallen };
}

const byLine = (faults: readonly LineFault[]) => faults.toSorted((a, b) => a.line - b.line);

export interface Mends {
  /** The rows are put in the order of r. */
  sorted: boolean;
  /** Lines that are no row, and rows whose r stands there already, are passed over. */
  leftOut: boolean;
}

export interface ReadRows {
  rows: Row[];
  /** What still hinders. */
  faults: LineFault[];
  /** Lines that are, or may be, left out. */
  leavable: LineFault[];
  /** True where nothing but the order of the rows is wrong. */
  unsorted: boolean;
}

/** The rows of two columns, with a fault in words for every line that is none. Rows out of order are sorted, never left out. */
export function readRows(
  table: RawTable,
  columns: { r: number; V: number },
  { sorted, leftOut }: Mends,
): ReadRows {
  const { found, unread } = foundIn(table, columns);
  if (sorted) found.sort((a, b) => a.row[0] - b.row[0]);
  const { twice, fallen } = orderFaults(found);
  const leavable = byLine([...unread, ...twice]);
  const out = new Set(leftOut ? twice.map(({ line }) => line) : []);
  return {
    rows: found.filter(({ line }) => !out.has(line)).map(({ row }) => row),
    faults: byLine(leftOut ? fallen : [...leavable, ...fallen]),
    leavable,
    unsorted: fallen.length > 0 && (leftOut || unread.length === 0),
  };
}

/** Every n-th row and the last, so that no more than `most` are left. */
export function thinned(rows: readonly Row[], most: number): Row[] {
  const step = Math.ceil((rows.length - 1) / Math.max(1, most - 1));
  if (step <= 1) return [...rows];
  return rows.filter((_, i) => i % step === 0 || i === rows.length - 1);
}
