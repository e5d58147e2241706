import { isNamedQuantities, isPoints } from '#shared/contracts/terms.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { composedUnit } from '#shared/units/composed.ts';
import { AT_60, SLOW, withTerms } from './limit-start.ts';
import type { Start } from './limit-start.ts';
import type { Limit } from './limit-sides.ts';

const LENGTHS = 2;
const ENERGIES = 1 / LENGTHS ** 2;

/** A value with every length in it doubled and every energy quartered. */
function grown(value: number, unit: string): number {
  const { powers } = composedUnit(unit);
  return value * LENGTHS ** (powers['angstrom'] ?? 0) * ENERGIES ** (powers['eV'] ?? 0);
}

/** The same V(r) twice as wide and a quarter as deep; null for what holds no such. */
function widened(term: InteractionTerm): InteractionTerm | null {
  if (isPoints(term['points'])) {
    const points = term['points'].map(([r, V]): [number, number] => [LENGTHS * r, ENERGIES * V]);
    return { ...term, points };
  }
  const { parameters } = term;
  if (typeof term['formula'] !== 'string' || !isNamedQuantities(parameters)) return null;
  return {
    ...term,
    parameters: Object.fromEntries(
      Object.entries(parameters).map(([name, value]) => [
        name,
        typeof value === 'number' ? value : { ...value, value: grown(value.value, value.unit) },
      ]),
    ),
  };
}

/** kr and V/T are what they were: lengths are counted in twice the unit, and dσ/dΩ is a length squared. */
export function profileLimits({ body }: Start, term: InteractionTerm): Limit[] {
  const wide = widened(term);
  if (!wide) return [];
  const slow = { ...body, ...SLOW };
  const energy = { ...body.energy, value: ENERGIES * body.energy.value };
  return [
    {
      key: 'similar',
      limit: 'every length doubled, every energy quartered, without relativity',
      holds: 'dσ/dΩ at 60° is four times as large',
      expected: { body: slow, read: AT_60, factor: LENGTHS ** 2 },
      obtained: { body: withTerms(slow, [wide], { energy }), read: AT_60, factor: 1 },
      within: 0,
    },
  ];
}
