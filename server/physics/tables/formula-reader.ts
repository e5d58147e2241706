import { DomainError } from '#shared/errors.ts';
import { chemicalElement } from './elements.ts';

const LONGEST = 200;
const DEEPEST = 8;
const SMALLEST_COUNT = 1e-6;
const LARGEST_COUNT = 1e6;
const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const CLOSING: Readonly<Record<string, string>> = { '(': ')', '[': ']', '{': '}' };

type Counts = Map<string, number>;

interface Reader {
  text: string;
  at: number;
  depth: number;
}

function refuse(text: string, at: number, what: string): never {
  const shown = text.length > 40 ? `${text.slice(0, 40)}…` : text;
  throw new DomainError('invalidInput', `Formula \`${shown}\`, character ${at + 1}: ${what}`);
}

/** ¹⁰B₄C and [10B]4C are one thing: raised digits become the bracketed form, lowered ones plain counts. */
function plainDigits(text: string): string {
  const raised = new RegExp(`([${SUPERSCRIPTS}]+)([A-Z][a-z]?)`, 'gu');
  return text
    .replace(raised, (_, digits: string, symbol: string) => {
      const mass = [...digits].map((digit) => SUPERSCRIPTS.indexOf(digit)).join('');
      return `[${mass}${symbol}]`;
    })
    .normalize('NFKC')
    .replace(/[·•⋅∙*]/g, '·')
    .replace(/[–−]/g, '-')
    .trim();
}

function add(into: Counts, from: Counts, factor: number): void {
  for (const [name, count] of from) into.set(name, (into.get(name) ?? 0) + count * factor);
}

function match(reader: Reader, pattern: RegExp): RegExpExecArray | null {
  const sticky = new RegExp(pattern.source, 'y');
  sticky.lastIndex = reader.at;
  const found = sticky.exec(reader.text);
  if (found) reader.at += found[0].length;
  return found;
}

function readCount(reader: Reader): number {
  const at = reader.at;
  const found = match(reader, /\d+(\.\d+)?/);
  if (!found) return 1;
  const rest = reader.text.slice(reader.at);
  if (found[1] !== undefined && /^[HD]2O([^a-z\d]|$)/.test(rest)) {
    const [whole = '', water = ''] = found[0].split('.');
    refuse(reader.text, at, `is this a hydrate? Write it as ${whole}·${water}${rest.slice(0, 3)}.`);
  }
  const count = Number(found[0]);
  if (!(count >= SMALLEST_COUNT && count <= LARGEST_COUNT)) {
    refuse(
      reader.text,
      at,
      `a count lies between ${SMALLEST_COUNT} and 1e6; leave out what is not there.`,
    );
  }
  return count;
}

/** D and T are the only nuclides with symbols of their own. */
function nameOf(symbol: string, massNumber: string | undefined): string {
  if (symbol === 'D' || symbol === 'T') return symbol === 'D' ? 'H-2' : 'H-3';
  return massNumber === undefined ? symbol : `${symbol}-${Number(massNumber)}`;
}

function checkSymbol(reader: Reader, at: number, symbol: string): void {
  if (symbol === 'D' || symbol === 'T') return;
  try {
    chemicalElement(symbol);
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    refuse(
      reader.text,
      at,
      `${error.message} Symbols are a capital and at most one small letter: CO is carbon monoxide, Co cobalt.`,
    );
  }
}

/** [10B] or [B-10]; the count after it is read by the caller. */
function readIsotopeBracket(reader: Reader): string | null {
  const at = reader.at;
  const found = match(reader, /\[(?:(\d{1,3})-?([A-Z][a-z]?)|([A-Z][a-z]?)-(\d{1,3}))\]/);
  if (!found) return null;
  const symbol = found[2] ?? found[3] ?? '';
  if (symbol === 'D' || symbol === 'T') {
    refuse(reader.text, at, `${symbol} is an isotope already; write ${symbol} alone.`);
  }
  checkSymbol(reader, at + 1, symbol);
  return nameOf(symbol, found[1] ?? found[4]);
}

function readAtom(reader: Reader, into: Counts): void {
  const at = reader.at;
  const bracket = readIsotopeBracket(reader);
  if (bracket !== null) return add(into, new Map([[bracket, readCount(reader)]]), 1);
  const found = match(reader, /([A-Z][a-z]?)(?:-(\d{1,3}))?/);
  if (!found) refuse(reader.text, at, wrongStart(reader.text.slice(at)));
  const [, symbol = '', massNumber] = found;
  checkSymbol(reader, at, symbol);
  const name = nameOf(symbol, massNumber);
  add(into, new Map([[name, massNumber === undefined ? readCount(reader) : 1]]), 1);
}

function wrongStart(rest: string): string {
  if (/^[a-z]/.test(rest)) return 'an element symbol begins with a capital, as in H2O.';
  if (/^\d/.test(rest))
    return 'a number stands after its element, as in H2O; write an isotope as [10B]4C or D2O.';
  if (/^\s/.test(rest)) return 'leave out spaces.';
  if (/^[+-]/.test(rest)) return 'leave out charges and signs: the formula names the atoms only.';
  if (/^[)\]}]/.test(rest)) return 'this bracket closes nothing.';
  if (/^[.,]/.test(rest))
    return 'join parts with a raised dot, as in CaSO4·2H2O, and write decimals with a point after a digit.';
  return 'an element symbol is expected here, as in C10H8O4.';
}

function readGroup(reader: Reader, into: Counts): boolean {
  const at = reader.at;
  const opening = reader.text[at] ?? '';
  const closing = CLOSING[opening];
  const isotope = /^\[(\d{1,3}-?[A-Z][a-z]?|[A-Z][a-z]?-\d{1,3})\]/.test(
    reader.text.slice(at, at + 9),
  );
  if (closing === undefined || isotope) return false;
  reader.at += 1;
  reader.depth += 1;
  if (reader.depth > DEEPEST) refuse(reader.text, at, `brackets nest at most ${DEEPEST} deep.`);
  const inner = readUnits(reader);
  if (inner.size === 0) refuse(reader.text, at, 'these brackets are empty.');
  if (reader.text[reader.at] !== closing)
    refuse(reader.text, at, `this bracket is not closed with ${closing}.`);
  reader.at += 1;
  reader.depth -= 1;
  add(into, inner, readCount(reader));
  return true;
}

/** Atoms and groups up to a closing bracket, a raised dot or the end. */
function readUnits(reader: Reader): Counts {
  const counts: Counts = new Map();
  while (reader.at < reader.text.length && !/[)\]}·\s]/.test(reader.text[reader.at] ?? '')) {
    if (!readGroup(reader, counts)) readAtom(reader, counts);
  }
  return counts;
}

/**
 * Atoms of a formula by name (C, or H-2 for a nuclide), in the order of first appearance; the grammar is that of `parseFormula`.
 * @throws DomainError('invalidInput') that shows the place and the mend
 */
export function readFormula(given: string): Counts {
  if (given.length > LONGEST)
    refuse(given, LONGEST, `a formula has at most ${LONGEST} characters.`);
  const text = plainDigits(given);
  if (text === '') refuse(given, 0, 'it is empty; write it as in C10H8O4.');
  const lone = /^(\d{1,3})([A-Z][a-z]?)(\d*(?:\.\d+)?)$/.exec(text);
  const reader: Reader = {
    text: lone ? `[${lone[1]}${lone[2]}]${lone[3]}` : text,
    at: 0,
    depth: 0,
  };
  const counts: Counts = new Map();
  for (let first = true; ; first = false) {
    const at = reader.at;
    const multiple = first ? 1 : readCount(reader);
    const unit = readUnits(reader);
    if (unit.size === 0) refuse(reader.text, at, wrongStart(reader.text.slice(at)));
    add(counts, unit, multiple);
    if (reader.at === reader.text.length) return counts;
    if (reader.text[reader.at] !== '·')
      refuse(reader.text, reader.at, wrongStart(reader.text.slice(reader.at)));
    reader.at += 1;
  }
}
