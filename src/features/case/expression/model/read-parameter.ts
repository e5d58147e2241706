import type { NamedQuantities } from '#shared/contracts/terms.ts';
import { DomainError } from '#shared/errors.ts';
import { composedUnit } from '#shared/units/composed.ts';
import { fullDigits } from '#shared/units/format.ts';
import { readNumber } from '#shared/units/read-number.ts';
import { readUnit, simplify } from '#shared/units/unit-words.ts';
import { DIMENSION_NAMES, isUnit } from '#shared/units/vocabulary.ts';
import type { Dimension } from '#shared/units/vocabulary.ts';
import { same } from '#src/lib/same.ts';
import { typedForm } from '../../model/typing.ts';
import type { Reading } from '../../model/typing.ts';

type Value = NamedQuantities[string];

const KINDS: readonly Dimension[] = ['energy', 'length', 'energyLength', 'area', 'volume', 'angle'];
const MADE_OF = ['eV', 'angstrom', 'rad'];
const MEND =
  'Units are made of energies and lengths, such as eV, angstrom, eV angstrom or 1/angstrom; a plain number has none.';

function isComposed(unit: string): boolean {
  try {
    return Object.keys(composedUnit(unit).powers).every((base) => MADE_OF.includes(base));
  } catch (error) {
    if (error instanceof DomainError) return false;
    throw error;
  }
}

/** A number, or a number with a unit made of energies and lengths. */
export function readParameterText(text: string): Reading<Value> {
  const number = readNumber(text);
  if (!number.ok) return { problem: number.message };
  const { value, rest } = number;
  if (rest === '') return { value };
  for (const kind of KINDS) {
    const unit = readUnit(rest, kind);
    if (unit) return { value: { value, unit: unit.unit } };
  }
  const unit = simplify(rest);
  if (isComposed(unit)) return { value: { value, unit } };
  return { problem: `“${rest}” has no place in a potential. ${MEND}` };
}

/** What is shown in the field: what was typed if it still means the value, else the value. */
export function parameterText(value: Value, entered: string | undefined): string {
  if (entered !== undefined) {
    const reading = readParameterText(entered);
    if ('value' in reading && same(reading.value, value)) return entered;
  }
  return typeof value === 'number' ? fullDigits(value) : typedForm(value);
}

/** What kind of quantity stands there, in a word or two. */
export function kindOf(value: Value): string {
  if (typeof value === 'number') return 'plain number';
  const kind = KINDS.find((one) => isUnit(value.unit, one));
  return kind ? DIMENSION_NAMES[kind] : value.unit;
}
