import { isNamedQuantities, isPoints, isQuantity } from '#shared/contracts/terms.ts';
import type { InteractionTerm, TermValue } from '#shared/contracts/terms.ts';
import { fromInternal, toInternal, unitMessage } from '#shared/units/quantity.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { UNITS, isUnit } from '#shared/units/vocabulary.ts';
import { isNamed } from '#server/physics/potentials/parameters.ts';
import type {
  AnyParameter,
  FormParameter,
  FormValue,
  NamedParameter,
} from '#server/physics/potentials/types.ts';
import { didYouMean } from './nearest.ts';

/** What stands beside the points of a table: how they are written, and the text they came from. */
export const TABLE_MEMBERS = ['lengthUnit', 'energyUnit', 'original'] as const;

/** A value in internal units, or faults in words with their place below the term. */
export type Reading = { value: FormValue } | { faults: { path: string; message: string }[] };

const fault = (path: string, message: string): Reading => ({ faults: [{ path, message }] });

export function example({ default: value, key }: AnyParameter): string {
  return `"${key}": ${JSON.stringify(value)}`;
}

const shown = ({ value, unit }: Quantity): string => `${Number(value.toPrecision(6))} ${unit}`;

/** Bounds in the unit that was typed, so that the message can be compared with it. */
function boundsFault(parameter: FormParameter, value: number, unit: string | null): string | null {
  const { key, min = -Infinity, max = Infinity, exclusiveMin = false, dimension } = parameter;
  const say = (bound: number) =>
    unit === null || dimension === 'number'
      ? String(bound)
      : shown(fromInternal(bound, unit, dimension));
  if (key === 'W0' && value > 0) {
    return 'W0 must be zero or negative: a negative imaginary part absorbs, a positive one would create particles.';
  }
  if (!(exclusiveMin ? value > min : value >= min)) {
    return `${key} must be ${exclusiveMin ? 'above' : 'at least'} ${say(min)}.`;
  }
  if (!(value <= max)) return `${key} must be at most ${say(max)}.`;
  if (parameter.integer && !Number.isInteger(value)) return `${key} must be a whole number.`;
  return null;
}

function readNumber(parameter: FormParameter, sent: TermValue): Reading {
  const { key, dimension } = parameter;
  if (dimension === 'number') {
    if (typeof sent !== 'number') {
      return fault(`/${key}`, `${key} is a plain number, such as ${example(parameter)}.`);
    }
    const wrong = boundsFault(parameter, sent, null);
    return wrong === null ? { value: sent } : fault(`/${key}`, wrong);
  }
  if (!isQuantity(sent)) {
    return fault(`/${key}`, `${key} needs a value and a unit, such as ${example(parameter)}.`);
  }
  if (!isUnit(sent.unit, dimension)) return fault(`/${key}`, unitMessage(sent.unit, dimension));
  const value = toInternal(sent, dimension);
  const wrong = boundsFault(parameter, value, sent.unit);
  return wrong === null ? { value } : fault(`/${key}`, wrong);
}

function factorOf(
  key: 'lengthUnit' | 'energyUnit',
  dimension: 'length' | 'energy',
  term: InteractionTerm,
): { factor: number } | { path: string; message: string } {
  const unit = term[key];
  const factor =
    typeof unit === 'string' && isUnit(unit, dimension) ? UNITS[dimension][unit] : undefined;
  return factor === undefined
    ? { path: `/${key}`, message: unitMessage(unit, dimension) }
    : { factor };
}

/** Points in angstrom and eV, from the units that stand beside them. */
function readPoints({ key }: NamedParameter, sent: TermValue, term: InteractionTerm): Reading {
  const length = factorOf('lengthUnit', 'length', term);
  const energy = factorOf('energyUnit', 'energy', term);
  if (!isPoints(sent) || 'message' in length || 'message' in energy) {
    const faults = [length, energy].flatMap((one) => ('message' in one ? [one] : []));
    const list = { path: `/${key}`, message: `${key} is a list of pairs, [[r, V], …].` };
    return { faults: isPoints(sent) ? faults : [...faults, list] };
  }
  return { value: sent.map(([r, v]) => [r * length.factor, v * energy.factor] as const) };
}

function readNamed(parameter: NamedParameter, sent: TermValue, term: InteractionTerm): Reading {
  const { key, dimension, choices } = parameter;
  if (dimension === 'points') return readPoints(parameter, sent, term);
  if (dimension === 'quantities') {
    return isNamedQuantities(sent)
      ? { value: sent }
      : fault(`/${key}`, `${key} holds quantities by name, such as ${example(parameter)}.`);
  }
  if (typeof sent !== 'string') {
    const what = dimension === 'formula' ? 'a text' : 'a name';
    return fault(`/${key}`, `${key} is ${what}, such as ${example(parameter)}.`);
  }
  if (choices && !choices.includes(sent)) {
    const hint = didYouMean(sent, choices);
    return fault(`/${key}`, `${key} is one of ${choices.join(', ')}.${hint}`);
  }
  return { value: sent };
}

/** One parameter as it was sent, in internal units. */
export function readParameter(
  parameter: AnyParameter,
  sent: TermValue,
  term: InteractionTerm,
): Reading {
  return isNamed(parameter) ? readNamed(parameter, sent, term) : readNumber(parameter, sent);
}
