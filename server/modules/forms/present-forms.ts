import type { FormInfo, FormParameterInfo } from '#shared/contracts/forms.ts';
import { unitFactor } from '#shared/units/quantity.ts';
import type { Form, FormParameter } from '#server/physics/potentials/types.ts';

/** A bound in the unit of the default; the last digit of a conversion is no information. */
function boundIn(bound: number, { default: value, dimension }: FormParameter): number {
  if (typeof value === 'number' || dimension === 'number') return bound;
  return Number((bound / unitFactor(value.unit, dimension)).toPrecision(12));
}

function presentParameter(parameter: FormParameter): FormParameterInfo {
  const { key, label, symbol, dimension, description, min, max } = parameter;
  const { exclusiveMin, optional, integer } = parameter;
  return {
    key,
    label,
    symbol,
    dimension,
    default: parameter.default,
    ...(min !== undefined && { minimum: boundIn(min, parameter) }),
    ...(max !== undefined && { maximum: boundIn(max, parameter) }),
    ...(exclusiveMin !== undefined && { exclusiveMinimum: exclusiveMin }),
    ...(optional !== undefined && { optional }),
    ...(integer !== undefined && { integer }),
    description,
  };
}

export function presentForm(form: Form): FormInfo {
  const { key, label, formula, transformFormula, source, parameters } = form;
  return {
    key,
    label,
    formula,
    transformFormula,
    source,
    parameters: parameters.map(presentParameter),
  };
}
