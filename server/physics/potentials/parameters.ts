import type {
  AnyParameter,
  Complex,
  FormParameter,
  FormValues,
  NamedParameter,
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

function isNamed(parameter: AnyParameter): parameter is NamedParameter {
  return ['choice', 'element', 'nuclide', 'points'].includes(parameter.dimension);
}

function check(parameter: AnyParameter, value: number | string | Points): void {
  const { key } = parameter;
  if (isNamed(parameter)) {
    if (parameter.dimension === 'points') {
      if (typeof value !== 'object') refuse(key, `${key} must be a list of pairs [r, V]`);
    } else if (typeof value === 'string') checkName(parameter, value);
    else refuse(key, `${key} must be a name`);
  } else if (typeof value === 'number') checkBounds(parameter, value);
  else refuse(key, `${key} must be a number`);
}

/** Reads parameter values that were checked against the declaration of their form. */
export interface ParameterReader {
  need: (key: string) => number;
  /** Undefined where it was left out. */
  optional: (key: string) => number | undefined;
  name: (key: string) => string | undefined;
  points: (key: string) => Points | undefined;
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
    else if (!parameter.optional) refuse(parameter.key, `${parameter.key} is missing`);
  }
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
      return typeof value === 'object' ? value : undefined;
    },
  };
}

/** V0 + i W0, where W0 may be left out. */
export function complexStrength(read: ParameterReader): Complex {
  return { re: read.need('V0'), im: read.optional('W0') ?? 0 };
}
