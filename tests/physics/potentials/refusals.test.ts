import { describe, expect, it } from 'vitest';
import { FORMS } from '#server/physics/potentials/register.ts';
import { isNamed } from '#server/physics/potentials/parameters.ts';
import type { Form, FormParameter, FormValue } from '#server/physics/potentials/types.ts';
import { DomainError } from '#shared/errors.ts';
import { CONTEXT, defaultOf, defaultValues } from './build-term.ts';

/** One for every needed number, defaults for names. */
function plain(form: Form): Record<string, FormValue> {
  const starts = Object.entries(defaultValues(form));
  return Object.fromEntries(
    starts.map(([key, start]) => [key, typeof start === 'number' ? 1 : start]),
  );
}

function refusal(form: Form, values: Record<string, FormValue>): DomainError {
  try {
    form.build(values, CONTEXT);
  } catch (error) {
    if (error instanceof DomainError) return error;
    throw error;
  }
  throw new Error(`${form.key} took ${JSON.stringify(values)}`);
}

const PARAMETERS = FORMS.flatMap((form) =>
  form.parameters.map((parameter): [string, string, Form] => [form.key, parameter.key, form]),
);
const NUMBERS = FORMS.flatMap((form) =>
  form.parameters
    .filter((parameter): parameter is FormParameter => !isNamed(parameter))
    .map((parameter): [string, string, Form, FormParameter] => [
      form.key,
      parameter.key,
      form,
      parameter,
    ]),
);
const ALTERNATIVES = FORMS.flatMap((form) =>
  form.parameters
    .filter(({ oneOf }) => oneOf !== undefined)
    .map(({ key }): [string, string, Form] => [form.key, key, form]),
);

describe('refusals', () => {
  it.each(NUMBERS)(
    '%s refuses %s that is no number or out of bounds, by name',
    (_, key, form, { min = NaN, max = NaN }) => {
      const beyond = [min - 1, max * 2 + 1];
      for (const value of [NaN, Infinity, -Infinity, ...beyond]) {
        const error = refusal(form, { ...plain(form), [key]: value });
        expect(error.code).toBe('invalidInput');
        expect(error.details.errors).toEqual([{ path: `/${key}`, message: error.message }]);
        expect(error.message).toContain(key);
      }
    },
  );

  it.each(PARAMETERS)('%s misses %s only where it is needed', (_, key, form) => {
    const rest = Object.fromEntries(Object.entries(plain(form)).filter(([name]) => name !== key));
    const { optional, oneOf } = form.parameters.find((one) => one.key === key) ?? {};
    if (oneOf !== undefined) return;
    if (optional) expect(() => form.build(rest, CONTEXT)).not.toThrow();
    else expect(refusal(form, rest).message).toBe(`${key} is missing`);
  });

  it('exactly one of alternatives', () => {
    for (const [, key, form] of ALTERNATIVES) {
      const all = Object.fromEntries(form.parameters.map((one) => [one.key, defaultOf(one)]));
      expect(refusal(form, {}).message, key).toContain('Give exactly one of');
      expect(refusal(form, all).message).toContain(key);
    }
  });

  it.each(FORMS.filter((form) => form.parameters.some(({ key }) => key === 'W0')))(
    '$key: a positive W0 would create particles',
    (form) => {
      const error = refusal(form, { ...plain(form), W0: 1e-3 });
      expect(error.message).toContain('negative or zero');
      expect(error.message).toContain('absorbs');
    },
  );

  it.each(FORMS)('$key: refuses a parameter that it does not have', (form) => {
    const error = refusal(form, { ...plain(form), depth: 1 });
    expect(error.details.errors?.[0]?.path).toBe('/depth');
    expect(error.message).toContain(form.parameters[0]?.key);
  });

  const STRENGTHS = ['V0', 'g', 'b', 'chargeProduct', 'alpha'];
  const withStrength = FORMS.filter(({ parameters }) =>
    parameters.some(({ key }) => STRENGTHS.includes(key)),
  );

  it.each(withStrength)('$key: takes a strength of zero', (form) => {
    const strength = form.parameters.find(({ key }) => STRENGTHS.includes(key));
    const term = form.build({ ...plain(form), [strength?.key ?? '']: 0 }, CONTEXT);
    expect(Math.abs(term.strength.re)).toBe(0);
  });

  it('refuses lengths of zero, but for the radius of woodsSaxon', () => {
    for (const form of FORMS) {
      for (const { key, dimension } of form.parameters) {
        if (dimension !== 'length' || key === 'b') continue;
        const values = { ...plain(form), [key]: 0 };
        if (form.key === 'woodsSaxon' && key === 'R') {
          expect(() => form.build(values, CONTEXT)).not.toThrow();
        } else {
          expect(refusal(form, values).message).toContain('at least');
        }
      }
    }
  });
});
