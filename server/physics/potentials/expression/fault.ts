import { refuse } from '../parameters.ts';

/** A stretch of the formula, from the first character to the one after the last. */
export interface Span {
  from: number;
  to: number;
}

const LONGEST_QUOTE = 30;

/** The words of the formula at a stretch, cut where they are long. */
export function quote(formula: string, { from, to }: Span): string {
  const text = formula.slice(from, to).trim();
  return text.length <= LONGEST_QUOTE ? text : `${text.slice(0, LONGEST_QUOTE - 1)}…`;
}

/** Refuses a formula at a place; characters are counted from 1. */
export function refuseAt(from: number, message: string): never {
  refuse('formula', `Character ${from + 1}: ${message}`);
}
