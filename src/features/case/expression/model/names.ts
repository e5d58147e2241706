import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { NamedQuantities } from '#shared/contracts/terms.ts';
import { same } from '#src/lib/same.ts';

/** Numbers are passed over whole: the e of 2e3 is no name, the 0 of V0 no number. */
const WORDS =
  /(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?|[A-Za-z_\u0391-\u03c9][A-Za-z0-9_\u0391-\u03c9]*/g;

/** The names in a formula that it does not know by itself, in the order in which they appear. */
export function freeNames(formula: string, words: readonly string[]): string[] {
  const found = formula.match(WORDS) ?? [];
  return [...new Set(found.filter((word) => !/^[\d.]/.test(word) && !words.includes(word)))];
}

type Units = CaseDocument['units'];

/** What a new name most likely stands for: papers write V0, a, R. */
export function likelyValue(name: string, units: Units): NamedQuantities[string] {
  const nuclear = units?.length === 'fm';
  const length = units?.length ?? 'angstrom';
  const energy = units?.energy ?? 'eV';
  if (/^[VUWED]/.test(name)) return { value: 1, unit: energy };
  if (/^(g|k|e2)$/.test(name)) return { value: 1, unit: nuclear ? 'MeV fm' : 'eV angstrom' };
  if (/^([abcdlswLR]|r\w+)/.test(name)) return { value: 1, unit: length };
  return 1;
}

/**
 * The parameters of a formula that has just been changed: new names begin with a likely value; names that went stay if somebody
 * gave them a value, for they may come back.
 */
export function parametersFor(
  formula: string,
  words: readonly string[],
  before: NamedQuantities,
  units: Units,
): NamedQuantities {
  const names = freeNames(formula, words);
  const kept = Object.entries(before).filter(
    ([name, value]) => !names.includes(name) && !same(value, likelyValue(name, units)),
  );
  const used = names.map((name) => [name, before[name] ?? likelyValue(name, units)] as const);
  return Object.fromEntries([...used, ...kept]);
}

/** Parameters in the order of the formula, those it does not name last. */
export function inOrder(
  formula: string,
  words: readonly string[],
  parameters: NamedQuantities,
): { name: string; value: NamedQuantities[string]; used: boolean }[] {
  const names = freeNames(formula, words);
  const row = (name: string, used: boolean) => {
    const value = parameters[name];
    return value === undefined ? [] : [{ name, value, used }];
  };
  const rest = Object.keys(parameters).filter((name) => !names.includes(name));
  return [
    ...names.flatMap((name) => row(name, true)),
    ...rest.sort().flatMap((name) => row(name, false)),
  ];
}
