/** How the columns of a text are told apart, and how its numbers are written. */
export type Separator = 'tab' | 'semicolon' | 'comma' | 'space';
export type DecimalSign = 'point' | 'comma';
export interface Layout {
  separator: Separator;
  decimal: DecimalSign;
}

export const SEPARATOR_NAMES: Record<Separator, string> = {
  tab: 'tabs',
  semicolon: 'semicolons',
  comma: 'commas',
  space: 'spaces',
};
export const DECIMAL_NAMES: Record<DecimalSign, string> = {
  point: 'point, 0.5',
  comma: 'comma, 0,5',
};

const SAMPLE = 50;
const NUMBER_EITHER = /^[-+]?(\d+(\.\d*|,\d+)?|[.,]\d+)([eEdD][-+]?\d+)?$/;

/** Printed minus signs as typed ones. */
export const plainSigns = (text: string): string => text.replace(/[\u2212\u2013]/g, '-');

export function splitLine(line: string, separator: Separator): string[] {
  const trimmed = separator === 'tab' ? line.replace(/^ +|\s+$/g, '') : line.trim();
  switch (separator) {
    case 'tab':
      return trimmed.split('\t').map((field) => field.trim());
    case 'semicolon':
      return trimmed.split(';').map((field) => field.trim());
    case 'comma':
      return trimmed.split(',').map((field) => field.trim());
    case 'space':
      return trimmed.split(/\s+/);
  }
}

/** A field in plain characters. */
export const plainField = (field: string): string => plainSigns(field).replace(/^"(.*)"$/, '$1');

/**
 * The number a field holds, or null: 1, .5, 1.5e-3, 1.5D-3, 0,5 where the comma is the decimal sign. The other sign is
 * refused, never dropped or converted: 1.234 beside decimal commas may be 1234.
 */
export function numberIn(field: string, decimal: DecimalSign): number | null {
  const text = plainField(field);
  if (!NUMBER_EITHER.test(text)) return null;
  if (text.includes(decimal === 'point' ? ',' : '.')) return null;
  const value = Number(text.replace(',', '.').replace(/[dD]/, 'e'));
  return Number.isFinite(value) ? value : null;
}

const share = (lines: readonly string[], test: (line: string) => boolean): number =>
  lines.length === 0 ? 0 : lines.filter(test).length / lines.length;

function separatorOf(lines: readonly string[]): Separator {
  if (share(lines, (line) => line.trim().includes('\t')) > 0.5) return 'tab';
  if (share(lines, (line) => line.includes(';')) > 0.5) return 'semicolon';
  const spaced = share(lines, (line) => {
    const fields = splitLine(plainSigns(line), 'space');
    return (
      fields.length > 1 &&
      fields.every((field) => NUMBER_EITHER.test(field) && !field.endsWith(','))
    );
  });
  if (spaced > 0.5) return 'space';
  return share(lines, (line) => line.includes(',')) > 0.5 ? 'comma' : 'space';
}

/** What separator and decimal sign a text is written with, by its first lines that begin with a number. */
export function guessLayout(lines: readonly string[]): Layout {
  const rows = lines.filter((line) => /^\s*"?[-+\u2212]?[.,]?\d/.test(line)).slice(0, SAMPLE);
  const separator = separatorOf(rows);
  if (separator === 'comma') return { separator, decimal: 'point' };
  const fields = rows.flatMap((line) => splitLine(line, separator));
  const points = fields.some((field) => /\d\.\d|^\.\d/.test(field));
  const commas = fields.some((field) => /^[-+\u2212]?\d*,\d+/.test(field));
  return { separator, decimal: commas && !points ? 'comma' : 'point' };
}

/** 1,234 is one and a bit or more than a thousand; 0,234 and 1,2345 can only be decimals. */
const EITHER_WAY = /^[-+]?[1-9]\d{0,2},\d{3}$/;

/** A number with a comma, where every one of the text would stand for something else with separators of thousands. */
export function ambiguousComma(fields: Iterable<string>): string | null {
  let sample: string | null = null;
  for (const field of fields) {
    const text = plainField(field);
    if (!text.includes(',')) continue;
    if (!EITHER_WAY.test(text)) return null;
    sample ??= text;
  }
  return sample;
}
