import { isPoints, isQuantity } from '#shared/contracts/terms.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { BOHR_ANGSTROM, HARTREE_EV } from '#shared/units/codata.ts';
import { toInternal } from '#shared/units/quantity.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { screenedCharges } from './limit-screening.ts';
import type { Start } from './limit-start.ts';

/** Parameters that multiply V as a whole, by form. */
const STRENGTHS: Readonly<Record<string, readonly string[]>> = {
  yukawa: ['V0'],
  exponential: ['V0'],
  hulthen: ['V0'],
  squareWell: ['V0', 'W0'],
  gaussian: ['V0', 'W0'],
  woodsSaxon: ['V0', 'W0'],
  deltaShell: ['g'],
  polarization: ['alpha'],
  contact: ['b'],
  coulomb: ['chargeProduct'],
  screenedCoulomb: ['chargeProduct'],
  extendedCharge: ['chargeProduct'],
};

/** Lengths beyond which V is small, by form; forms with a tail of Coulomb or of a power of r are missing. */
const RANGES: Readonly<Record<string, readonly string[]>> = {
  yukawa: ['a'],
  screenedCoulomb: ['a'],
  exponential: ['a'],
  hulthen: ['a'],
  gaussian: ['a'],
  squareWell: ['R'],
  woodsSaxon: ['R', 'a'],
  deltaShell: ['R'],
  contact: [],
};
/** Wider than the electrons of any neutral atom, angstrom: the widest Gaussian of the alkali metals included. */
const ATOM = 3;

/** Forms whose transform falls from the forward direction as q²: V of one sign that dies out within its range. */
const ONE_SIGN = [
  'yukawa',
  'screenedCoulomb',
  'exponential',
  'hulthen',
  'gaussian',
  'squareWell',
  'woodsSaxon',
  'deltaShell',
  'moliere',
  'krc',
  'universalIon',
  'atomicElectron',
];

/** Forms whose strength stands in the term itself, so that the charge of the target does not matter. */
const CHARGELESS = [
  'yukawa',
  'exponential',
  'hulthen',
  'squareWell',
  'gaussian',
  'woodsSaxon',
  'deltaShell',
  'polarization',
  'tabulated',
  'expression',
];

/** The term with V times a factor; null where no parameter of it does that. */
export function scaled(term: InteractionTerm, factor: number): InteractionTerm | null {
  if (isPoints(term['points'])) {
    const points = term['points'].map(([r, V]): [number, number] => [r, factor * V]);
    return { ...term, points };
  }
  if (typeof term['formula'] === 'string') {
    return { ...term, formula: `${factor}*(${term['formula']})` };
  }
  const names = (STRENGTHS[term.form] ?? []).filter((name) => term[name] !== undefined);
  if (names.length === 0) return null;
  const changed: InteractionTerm = { ...term };
  for (const name of names) {
    const value = term[name];
    if (isQuantity(value)) changed[name] = { ...value, value: value.value * factor };
    else if (typeof value === 'number') changed[name] = value * factor;
  }
  return changed;
}

/** A length of a term, angstrom. */
export function lengthOf(term: InteractionTerm, name: string): number | null {
  const value = term[name];
  return isQuantity(value) ? toInternal(value, 'length') : null;
}

/** Where the rows of a table end, and some e-foldings of an exponential through the last two beyond. */
function tableRange({ points, tail, lengthUnit }: InteractionTerm): number | null {
  if (!isPoints(points) || typeof lengthUnit !== 'string' || tail === 'coulomb') return null;
  const [[r1, V1] = [0, 0], [r2, V2] = [0, 0]] = points.slice(-2);
  const folding = tail === 'exponential' ? (r2 - r1) / Math.log(V1 / V2) : 0;
  return toInternal({ value: r2 + 5 * folding, unit: lengthUnit }, 'length');
}

/** Range of a term, angstrom; null where its tail has none. */
export function rangeOf(term: InteractionTerm, { body, reach }: Start): number | null {
  if (term.form === 'tabulated') return tableRange(term);
  if (term.form === 'expression') return reach;
  const screens = screenedCharges(term, body)?.screens;
  if (screens) return Math.max(...screens.map(({ length }) => length));
  if (term.form === 'atomicElectron') return ATOM;
  const names = RANGES[term.form];
  if (names === undefined) return null;
  return Math.max(0, ...names.map((name) => lengthOf(term, name) ?? 0));
}

/** Whether V of a term keeps its sign, so that what the forward peak loses goes as q² to begin with. */
export function keepsSign(term: InteractionTerm): boolean {
  const { points } = term;
  if (isPoints(points)) return points.every(([, V]) => V <= 0) || points.every(([, V]) => V >= 0);
  return ONE_SIGN.includes(term.form);
}

export function isChargeless({ form }: InteractionTerm): boolean {
  return CHARGELESS.includes(form);
}

export const angstroms = (value: number): Quantity => ({ value, unit: 'angstrom' });

/** Z1 Z2 of the Coulomb potential with the strength V0 a. */
export function chargeProductOf(V0: Quantity, a: number): number {
  return (toInternal(V0, 'energy') * a) / (HARTREE_EV * BOHR_ANGSTROM);
}
