import type { FormInfo, FormParameterInfo } from '#shared/contracts/forms.ts';
import { unitFactor } from '#shared/units/quantity.ts';
import { unitsOf } from '#shared/units/vocabulary.ts';
import { isNamed } from '#server/physics/potentials/parameters.ts';
import type {
  AnyParameter,
  Form,
  FormParameter,
  NamedParameter,
} from '#server/physics/potentials/types.ts';

/** A bound in the unit of the default; the last digit of a conversion is no information. */
function boundIn(bound: number, { default: value, dimension }: FormParameter): number {
  if (typeof value === 'number' || dimension === 'number') return bound;
  return Number((bound / unitFactor(value.unit, dimension)).toPrecision(12));
}

function shared(parameter: AnyParameter) {
  const { key, label, symbol, dimension, description, optional, when, oneOf } = parameter;
  return {
    key,
    label,
    symbol,
    dimension,
    description,
    ...(optional !== undefined && { optional }),
    ...(when && { when: { key: when.key, is: [...when.is] } }),
    ...(oneOf !== undefined && { oneOf }),
  };
}

function presentNumber(parameter: FormParameter): FormParameterInfo {
  const { min, max, exclusiveMin, integer } = parameter;
  return {
    ...shared(parameter),
    default: parameter.default,
    ...(min !== undefined && { minimum: boundIn(min, parameter) }),
    ...(max !== undefined && { maximum: boundIn(max, parameter) }),
    ...(exclusiveMin !== undefined && { exclusiveMinimum: exclusiveMin }),
    ...(integer !== undefined && { integer }),
  };
}

function presentNamed(parameter: NamedParameter): FormParameterInfo {
  const { choices, words, default: value } = parameter;
  return {
    ...shared(parameter),
    default: Array.isArray(value)
      ? value.map(([r, v]: readonly [number, number]): [number, number] => [r, v])
      : (value as FormParameterInfo['default']),
    ...(choices && { choices: [...choices] }),
    ...(words && { words: [...words] }),
  };
}

/** The units in which the points of a table are written: members of the term like its parameters. */
const TABLE_UNITS: FormParameterInfo[] = (
  [
    ['lengthUnit', 'Unit of r', 'r', 'length', 'angstrom'],
    ['energyUnit', 'Unit of V', 'V', 'energy', 'eV'],
  ] as const
).map(([key, label, symbol, dimension, unit]) => ({
  key,
  label,
  symbol,
  dimension: 'choice',
  choices: unitsOf(dimension),
  default: unit,
  description: `${label} in the points.`,
}));

function presentParameter(parameter: AnyParameter): FormParameterInfo[] {
  if (!isNamed(parameter)) return [presentNumber(parameter)];
  const named = presentNamed(parameter);
  return parameter.dimension === 'points' ? [...TABLE_UNITS, named] : [named];
}

export function presentForm(form: Form): FormInfo {
  const { key, label, formula, transformFormula, source, parameters } = form;
  return {
    key,
    label,
    formula,
    transformFormula,
    source,
    parameters: parameters.flatMap(presentParameter),
  };
}
