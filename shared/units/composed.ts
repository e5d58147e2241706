import { DomainError } from '#shared/errors.ts';
import { UNITS } from './vocabulary.ts';

/** Powers of the base units a composed unit is made of, and its factor to them (eV, angstrom, s, sr, A, rad, g, Pa, K). */
export interface Composed {
  factor: number;
  powers: Record<string, number>;
}

interface Atom {
  factor: number;
  base: string;
  power: number;
}

const BASES = [
  ['energy', 'eV'],
  ['length', 'angstrom'],
  ['time', 's'],
  ['solidAngle', 'sr'],
  ['current', 'A'],
  ['angle', 'rad'],
  ['pressure', 'Pa'],
  ['temperature', 'K'],
] as const;

function collectAtoms(): ReadonlyMap<string, Atom> {
  const atoms = new Map<string, Atom>();
  for (const [dimension, base] of BASES) {
    for (const [name, factor] of Object.entries(UNITS[dimension])) {
      atoms.set(name, { factor, base, power: 1 });
    }
  }
  for (const [name, factor] of Object.entries(UNITS.length)) {
    atoms.set(`${name}2`, { factor: factor ** 2, base: 'angstrom', power: 2 });
    atoms.set(`${name}3`, { factor: factor ** 3, base: 'angstrom', power: 3 });
  }
  // The vocabulary's own factors win: powers of 1e-5 are not exact.
  for (const [name, factor] of Object.entries(UNITS.area)) {
    atoms.set(name, { factor, base: 'angstrom', power: 2 });
  }
  for (const [name, factor] of Object.entries(UNITS.volume)) {
    atoms.set(name, { factor, base: 'angstrom', power: 3 });
  }
  for (const [name, factor] of [
    ['ug', 1e-6],
    ['mg', 1e-3],
    ['g', 1],
    ['kg', 1e3],
  ] as const) {
    atoms.set(name, { factor, base: 'g', power: 1 });
  }
  return atoms;
}
const ATOMS = collectAtoms();

/** Splits `eV angstrom3`, `angstrom2/sr` or `1/(eV sr)` into the names above and below the line. */
export function splitUnit(unit: string): { above: string[]; below: string[] } {
  const [above = '', below = '', ...rest] = unit.split('/');
  const inner = /^\((.+)\)$/.exec(below)?.[1] ?? below;
  const words = (text: string) => text.split(' ').filter((word) => word !== '' && word !== '1');
  const single = inner === below && words(below).length > 1;
  if (rest.length > 0 || single || (unit.includes('/') && words(inner).length === 0)) {
    throw new DomainError(
      'invalidInput',
      `\`${unit}\` is not a unit: write one line, as in 1/(eV sr).`,
    );
  }
  return { above: words(above), below: words(inner) };
}

/** What a composed unit is made of. Throws DomainError('invalidInput') for what is no unit. */
export function composedUnit(unit: string): Composed {
  const { above, below } = splitUnit(unit);
  const composed: Composed = { factor: 1, powers: {} };
  const take = (name: string, sign: 1 | -1) => {
    const atom = ATOMS.get(name);
    if (!atom) {
      throw new DomainError('invalidInput', `\`${name}\` in \`${unit}\` is not a unit.`);
    }
    composed.factor = sign > 0 ? composed.factor * atom.factor : composed.factor / atom.factor;
    composed.powers[atom.base] = (composed.powers[atom.base] ?? 0) + sign * atom.power;
  };
  above.forEach((name) => take(name, 1));
  below.forEach((name) => take(name, -1));
  return composed;
}

function sameKind(a: Composed, b: Composed): boolean {
  return [...new Set([...Object.keys(a.powers), ...Object.keys(b.powers)])].every(
    (base) => (a.powers[base] ?? 0) === (b.powers[base] ?? 0),
  );
}

/**
 * Factor from one composed unit to another of the same kind, such as angstrom2/sr to millibarn/sr.
 * Throws DomainError('invalidInput') for unknown units and for units of two kinds.
 */
export function composedFactor(from: string, to: string): number {
  if (from === to) return 1;
  const a = composedUnit(from);
  const b = composedUnit(to);
  if (!sameKind(a, b)) {
    throw new DomainError(
      'invalidInput',
      `\`${from}\` and \`${to}\` do not measure the same thing.`,
    );
  }
  return a.factor / b.factor;
}

/** A value in one composed unit, expressed in another of the same kind. */
export function convertComposed(value: number, from: string, to: string): number {
  return value * composedFactor(from, to);
}
