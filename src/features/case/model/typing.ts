import type { CaseDocument } from '#shared/contracts/cases.ts';
import { fullDigits, unitSymbol } from '#shared/units/format.ts';
import type { ParsedQuantity } from '#shared/units/parse.ts';
import { parseQuantity } from '#shared/units/parse.ts';
import type { ParseContext } from '#shared/units/parse.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { readNumber } from '#shared/units/read-number.ts';
import type { Dimension } from '#shared/units/vocabulary.ts';
import type { Draft, OpenText } from './editor.ts';
import { withEntered } from './entered.ts';
import { without } from './without.ts';

/** What a text in a field turned out to be: a value, a fault in words, or a question still out. */
export type Reading<T> = { value: T } | { problem: string } | { waiting: true };

function withOpen(draft: Draft, pointer: string, open: OpenText | null): Draft {
  const others = without(draft.open, pointer);
  return { ...draft, open: open === null ? others : { ...others, [pointer]: open } };
}

/** Takes a typed text: a value reaches the document, anything else stays in the field and the document stays as it was. */
export function takeText<T>(
  draft: Draft,
  pointer: string,
  text: string,
  reading: Reading<T>,
  put: (document: CaseDocument, value: T) => CaseDocument,
): Draft {
  if ('problem' in reading) return withOpen(draft, pointer, { text, problem: reading.problem });
  if ('waiting' in reading) return withOpen(draft, pointer, { text, problem: null });
  const document = withEntered(put(draft.document, reading.value), pointer, text);
  return { ...withOpen(draft, pointer, null), document };
}

/** Puts a value without a text of its own: what was typed before is forgotten. */
export function takeValue(
  draft: Draft,
  pointer: string,
  put: (document: CaseDocument) => CaseDocument,
): Draft {
  return {
    ...withOpen(draft, pointer, null),
    document: withEntered(put(draft.document), pointer, null),
  };
}

/** A quantity as it is typed: with a plain minus, so that it can be edited where it stands. */
export function typedForm(quantity: Quantity): string {
  const symbol = unitSymbol(quantity.unit);
  return symbol === '°'
    ? `${fullDigits(quantity.value)}°`
    : `${fullDigits(quantity.value)} ${symbol}`;
}

function means(parsed: ParsedQuantity, quantity: Quantity): boolean {
  if (!parsed.ok || parsed.quantity.unit !== quantity.unit) return false;
  const { value } = parsed.quantity;
  return Math.abs(value - quantity.value) <= 1e-12 * Math.abs(quantity.value);
}

/** What a quantity field shows: the open text, else what was typed if it still means the value, else the value. */
export function shownText(
  draft: Draft,
  pointer: string,
  quantity: Quantity | undefined,
  dimension: Dimension,
  context: ParseContext,
): string {
  const open = draft.open[pointer];
  if (open) return open.text;
  if (!quantity) return '';
  const entered = draft.document.entered?.[pointer];
  if (entered === undefined) return typedForm(quantity);
  // The menu may have moved on since: a bare number then reads in the unit of the value.
  const parsed = parseQuantity(entered, dimension, { ...context, unit: quantity.unit });
  return means(parsed, quantity) ? entered : typedForm(quantity);
}

export interface NumberRules {
  integer?: boolean | undefined;
  minimum?: number | undefined;
  maximum?: number | undefined;
  exclusiveMinimum?: boolean | undefined;
  /** Half-whole numbers, as spins are. */
  halves?: boolean;
  what: string;
}

/** Why a number will not do, in words; null when it will. */
export function outside(value: number, rules: NumberRules, unit = ''): string | null {
  const { minimum, maximum, what } = rules;
  const say = (bound: number) => `${fullDigits(bound).replace('-', '−')}${unit && ` ${unit}`}`;
  if (
    minimum !== undefined &&
    (rules.exclusiveMinimum ? !(value > minimum) : !(value >= minimum))
  ) {
    return `${what} must be ${rules.exclusiveMinimum ? 'above' : 'at least'} ${say(minimum)}.`;
  }
  if (maximum !== undefined && !(value <= maximum)) {
    return `${what} must be at most ${say(maximum)}.`;
  }
  if (rules.integer && !Number.isInteger(value)) return `${what} must be a whole number.`;
  if (rules.halves && !Number.isInteger(2 * value)) {
    return `${what} must be a whole or half-whole number.`;
  }
  return null;
}

export function readPlainNumber(text: string, rules: NumberRules): Reading<number> {
  if (text.trim() === '') return { problem: `${rules.what}: type a number.` };
  const read = readNumber(text);
  if (!read.ok) return { problem: read.message };
  if (read.rest !== '') return { problem: `${rules.what} is a number without a unit.` };
  const problem = outside(read.value, rules);
  return problem === null ? { value: read.value } : { problem };
}

/** Numbers separated by commas, semicolons or spaces. */
export function readNumberList(text: string, rules: NumberRules): Reading<number[]> {
  const words = text.split(/[\s,;]+/).filter((word) => word !== '');
  if (words.length === 0) return { problem: 'Type at least one angle, such as 0, 30, 60.' };
  if (words.length > 5000) return { problem: 'At most 5000 angles in one table.' };
  const values: number[] = [];
  for (const word of words) {
    const reading = readPlainNumber(word.replace(/°$/, ''), rules);
    if (!('value' in reading)) {
      return { problem: `\`${word}\`: ${'problem' in reading ? reading.problem : ''}` };
    }
    values.push(reading.value);
  }
  return { value: values };
}
