import type {
  AnyParameter,
  Complex,
  FormParameter,
  FormValue,
  FormValues,
  NamedParameter,
  NamedQuantities,
  Points,
} from './types.ts';
import { DomainError } from '#shared/errors.ts';

/** Strengths beyond a PeV and lengths from 1e-12 angstrom to 100 m leave nothing of physics out and no overflow in. */
const STRONGEST = 1e15;
const SHORTEST = 1e-12;
const LONGEST = 1e12;

type Typed = { value: number; unit: string };

export function strengthParameter(value: Typed, description: string): FormParameter {
  return {
    key: 'V0',
    label: 'Strength',
    symbol: 'V_0',
    dimension: 'energy',
    min: -STRONGEST,
    max: STRONGEST,
    default: value,
    description,
  };
}

export function absorptionParameter(unit: string): FormParameter {
  return {
    key: 'W0',
    label: 'Absorptive strength',
    symbol: 'W_0',
    dimension: 'energy',
    min: -STRONGEST,
    max: 0,
    optional: true,
    default: { value: 0, unit },
    description: 'Imaginary part of the strength. Negative absorbs; zero for a real potential.',
  };
}

/** A length that may not vanish. */
export function lengthParameter(
  naming: Pick<FormParameter, 'key' | 'label' | 'symbol' | 'description'>,
  value: Typed,
): FormParameter {
  return { ...naming, dimension: 'length', min: SHORTEST, max: LONGEST, default: value };
}

/** A radius that may be zero. */
export function radiusFromZero(
  naming: Pick<FormParameter, 'key' | 'label' | 'symbol' | 'description'>,
  value: Typed,
): FormParameter {
  return { ...naming, dimension: 'length', min: 0, max: LONGEST, default: value };
}

export function refuse(key: string, message: string): never {
  throw new DomainError('invalidInput', message, { errors: [{ path: `/${key}`, message }] });
}

/** What `find` finds in a table; a refusal of the name becomes one of the parameter. */
export function lookUp<T>(key: string, find: () => T): T {
  try {
    return find();
  } catch (error) {
    if (error instanceof DomainError && error.code === 'invalidInput') refuse(key, error.message);
    throw error;
  }
}

const INTERNAL_UNITS: Partial<Record<FormParameter['dimension'], string>> = {
  energy: ' eV',
  length: ' angstrom',
  energyLength: ' eV angstrom',
  volume: ' angstrom3',
};

function checkBounds(parameter: FormParameter, value: number): void {
  const { key, min = -Infinity, max = Infinity, exclusiveMin = false } = parameter;
  const unit = INTERNAL_UNITS[parameter.dimension] ?? '';
  if (!Number.isFinite(value)) refuse(key, `${key} must be a finite number`);
  if (key === 'W0' && value > 0) {
    refuse(
      key,
      'W0 must be negative or zero: a negative W0 absorbs, a positive one would create particles',
    );
  }
  if (!(exclusiveMin ? value > min : value >= min)) {
    const bound = exclusiveMin ? 'greater than' : 'at least';
    refuse(key, `${key} must be ${bound} ${min}${unit}, it is ${value}${unit}`);
  }
  if (!(value <= max)) refuse(key, `${key} must be at most ${max}${unit}, it is ${value}${unit}`);
  if (parameter.integer && !Number.isInteger(value)) refuse(key, `${key} must be a whole number`);
}

function checkName({ key, choices }: NamedParameter, value: string): void {
  if (choices && !choices.includes(value)) {
    refuse(key, `${key} must be one of ${choices.join(', ')}, it is ${JSON.stringify(value)}`);
  }
}

const NAMED = ['choice', 'element', 'nuclide', 'points', 'formula', 'quantities'];

export function isNamed(parameter: AnyParameter): parameter is NamedParameter {
  return NAMED.includes(parameter.dimension);
}

const isPoints = (value: FormValue): value is Points => Array.isArray(value);
const isQuantities = (value: FormValue): value is NamedQuantities =>
  typeof value === 'object' && !isPoints(value);

function checkNamed(parameter: NamedParameter, value: FormValue): void {
  const { key, dimension } = parameter;
  if (dimension === 'points') {
    if (!isPoints(value)) refuse(key, `${key} must be a list of pairs [r, V]`);
  } else if (dimension === 'quantities') {
    if (!isQuantities(value)) refuse(key, `${key} must be quantities by name`);
  } else if (typeof value === 'string') checkName(parameter, value);
  else refuse(key, `${key} must be a ${dimension === 'formula' ? 'text' : 'name'}`);
}

function check(parameter: AnyParameter, value: FormValue): void {
  if (isNamed(parameter)) checkNamed(parameter, value);
  else if (typeof value === 'number') checkBounds(parameter, value);
  else refuse(parameter.key, `${parameter.key} must be a number`);
}

/** Whether these values ask for the parameter at all. */
export function applies(
  { when }: AnyParameter,
  values: Readonly<Record<string, unknown>>,
): boolean {
  return when === undefined || when.is.some((value) => value === values[when.key]);
}

export interface ChoiceFault {
  key: string;
  message: string;
  /** Nothing was given where something is needed. */
  missing: boolean;
}

function groupFault(
  group: readonly string[],
  values: Readonly<Record<string, unknown>>,
): ChoiceFault[] {
  const found = group.filter((name) => values[name] !== undefined);
  const [key = ''] = group;
  if (found.length === 1) return [];
  const message = `Give exactly one of ${group.join(', ')}`;
  return found.length === 0
    ? [{ key, message: `${message}.`, missing: true }]
    : [
        {
          key: found[1] ?? key,
          message: `${message}, not ${found.join(' and ')}.`,
          missing: false,
        },
      ];
}

/** What is missing or too many among the parameters, by what they say of each other. */
export function choiceFaults(
  parameters: readonly AnyParameter[],
  values: Readonly<Record<string, unknown>>,
): ChoiceFault[] {
  const seen = new Set<string>();
  return parameters.flatMap((parameter) => {
    const { key, when, oneOf, optional } = parameter;
    const given = values[key] !== undefined;
    if (when && given && !applies(parameter, values)) {
      const message = `${key} goes with ${when.key} ${when.is.join(' or ')} only; leave it out.`;
      return [{ key, message, missing: false }];
    }
    if (oneOf !== undefined) {
      if (seen.has(oneOf)) return [];
      seen.add(oneOf);
      const group = parameters.filter((other) => other.oneOf === oneOf);
      return groupFault(
        group.map((other) => other.key),
        values,
      );
    }
    const missing = !given && !optional && applies(parameter, values);
    return missing ? [{ key, message: `${key} is missing`, missing }] : [];
  });
}

/** Reads parameter values that were checked against the declaration of their form. */
export interface ParameterReader {
  need: (key: string) => number;
  /** Undefined where it was left out. */
  optional: (key: string) => number | undefined;
  name: (key: string) => string | undefined;
  points: (key: string) => Points | undefined;
  quantities: (key: string) => NamedQuantities | undefined;
}

/**
 * Values of a form's parameters, checked against its declaration.
 *
 * @param parameters declaration of the form
 * @param values by key, in internal units
 * @returns a reader: the value of a key; an optional one that was left out reads as undefined
 * @throws DomainError invalidInput, with the key as pointer, for a missing, unknown or out-of-bounds value
 */
export function readParameters(
  parameters: readonly AnyParameter[],
  values: FormValues,
): ParameterReader {
  const known = new Set(parameters.map((parameter) => parameter.key));
  for (const key of Object.keys(values)) {
    if (!known.has(key)) {
      refuse(key, `${key} is no parameter of this form; it takes ${[...known].join(', ')}`);
    }
  }
  for (const parameter of parameters) {
    const value = values[parameter.key];
    if (value !== undefined) check(parameter, value);
  }
  const [fault] = choiceFaults(parameters, values);
  if (fault) refuse(fault.key, fault.message);
  const optional = (key: string) => {
    const value = values[key];
    return typeof value === 'number' ? value : undefined;
  };
  return {
    need: (key) => optional(key) ?? refuse(key, `${key} is missing`),
    optional,
    name: (key) => {
      const value = values[key];
      return typeof value === 'string' ? value : undefined;
    },
    points: (key) => {
      const value = values[key];
      return value !== undefined && isPoints(value) ? value : undefined;
    },
    quantities: (key) => {
      const value = values[key];
      return value !== undefined && isQuantities(value) ? value : undefined;
    },
  };
}

/** V0 + i W0, where W0 may be left out. */
export function complexStrength(read: ParameterReader): Complex {
  return { re: read.need('V0'), im: read.optional('W0') ?? 0 };
}
