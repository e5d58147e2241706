/** Powers of energy and length; what a formula handles has no other unit. */
export interface Unit {
  energy: number;
  length: number;
}

export const PLAIN: Unit = { energy: 0, length: 0 };
export const LENGTH: Unit = { energy: 0, length: 1 };
export const ENERGY: Unit = { energy: 1, length: 0 };

/** Powers are multiples of roots: their rounding is no difference. */
const SAME = 1e-9;

export function sameUnit(a: Unit, b: Unit): boolean {
  return Math.abs(a.energy - b.energy) < SAME && Math.abs(a.length - b.length) < SAME;
}

export const isPlain = (unit: Unit): boolean => sameUnit(unit, PLAIN);

export function product(a: Unit, b: Unit, sign: 1 | -1 = 1): Unit {
  return { energy: a.energy + sign * b.energy, length: a.length + sign * b.length };
}

export function power({ energy, length }: Unit, exponent: number): Unit {
  return { energy: energy * exponent, length: length * exponent };
}

const NAMES: [Unit, string][] = [
  [PLAIN, 'a plain number'],
  [ENERGY, 'an energy'],
  [LENGTH, 'a length'],
  [{ energy: 0, length: 2 }, 'an area'],
  [{ energy: 0, length: 3 }, 'a volume'],
  [{ energy: 1, length: 1 }, 'an energy times a length'],
  [{ energy: 1, length: -1 }, 'an energy over a length'],
  [{ energy: 0, length: -1 }, 'one over a length'],
];

const factor = (name: string, exponent: number): string =>
  exponent === 0 ? '' : exponent === 1 ? name : `${name}^${Number(exponent.toPrecision(4))}`;

/** The unit in words, with its article. */
export function unitName(unit: Unit): string {
  const known = NAMES.find(([candidate]) => sameUnit(candidate, unit));
  if (known) return known[1];
  return [factor('energy', unit.energy), factor('length', unit.length)]
    .filter((part) => part !== '')
    .join(' · ');
}
