import type { InteractionTerm } from '#shared/contracts/estimates.ts';
import { fromInternal, toInternal, unitMessage } from '#shared/units/quantity.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { isUnit } from '#shared/units/vocabulary.ts';
import type { Form, FormContext, FormParameter, Term } from '#server/physics/potentials/types.ts';
import { FORMS, formByKey } from '#server/physics/potentials/register.ts';
import type { Faults } from './faults.ts';

type Sent = InteractionTerm[string];

function example({ default: value, key }: FormParameter): string {
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

/** The value in internal units, or a fault in words. */
function readParameter(
  parameter: FormParameter,
  sent: Sent,
): { value: number } | { fault: string } {
  const { key, dimension } = parameter;
  if (dimension === 'number') {
    if (typeof sent !== 'number') {
      return { fault: `${key} is a plain number, such as ${example(parameter)}.` };
    }
    const fault = boundsFault(parameter, sent, null);
    return fault === null ? { value: sent } : { fault };
  }
  if (typeof sent !== 'object' || !('unit' in sent)) {
    return { fault: `${key} needs a value and a unit, such as ${example(parameter)}.` };
  }
  const quantity: Quantity = sent;
  if (!isUnit(quantity.unit, dimension)) return { fault: unitMessage(quantity.unit, dimension) };
  const value = toInternal(quantity, dimension);
  const fault = boundsFault(parameter, value, quantity.unit);
  return fault === null ? { value } : { fault };
}

function readValues(form: Form, sent: InteractionTerm, path: string, faults: Faults) {
  const values: Record<string, number> = {};
  const known = form.parameters.map(({ key }) => key);
  for (const key of Object.keys(sent)) {
    if (key !== 'form' && !known.includes(key)) {
      faults.add(
        `${path}/${key.replaceAll('~', '~0').replaceAll('/', '~1')}`,
        `"${key}" is no parameter of the form ${form.key}; it takes ${known.join(', ')}.`,
      );
    }
  }
  for (const parameter of form.parameters) {
    const given = Object.hasOwn(sent, parameter.key) ? sent[parameter.key] : undefined;
    if (given === undefined) {
      if (!parameter.optional) {
        faults.add(`${path}/${parameter.key}`, `This is missing; give ${example(parameter)}.`);
      }
      continue;
    }
    const read = readParameter(parameter, given);
    if ('fault' in read) faults.add(`${path}/${parameter.key}`, read.fault);
    else values[parameter.key] = read.value;
  }
  return values;
}

/** A term with its parameters read and checked, not built yet: the register is strict. */
export interface ReadTerm {
  form: Form;
  values: Record<string, number>;
  path: string;
}

export function readTerms(sent: readonly InteractionTerm[], faults: Faults): ReadTerm[] {
  return sent.flatMap((term, i) => {
    const path = `/interaction/terms/${i}`;
    const form = formByKey(term.form);
    if (!form) {
      const names = FORMS.map(({ key }) => key).join(', ');
      faults.add(`${path}/form`, `"${term.form}" is not a form of this version. Forms: ${names}.`);
      return [];
    }
    return [{ form, values: readValues(form, term, path, faults), path }];
  });
}

export function buildTerms(
  read: readonly ReadTerm[],
  context: FormContext,
  faults: Faults,
): Term[] {
  return read.flatMap(({ form, values, path }) => {
    const term = faults.within(path, () => form.build(values, context));
    return term ? [term] : [];
  });
}
