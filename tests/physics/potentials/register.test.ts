import katex from 'katex';
import { describe, expect, it } from 'vitest';
import { FORMS, formByKey } from '#server/physics/potentials/register.ts';
import { CONTEXT, defaultValues } from './build-term.ts';

describe('register of forms', () => {
  it('lists every form once and finds it by key', () => {
    expect(FORMS.map(({ key }) => key)).toEqual([
      'yukawa',
      'coulomb',
      'extendedCharge',
      'screenedCoulomb',
      'moliere',
      'krc',
      'universalIon',
      'atomicElectron',
      'squareWell',
      'gaussian',
      'exponential',
      'woodsSaxon',
      'deltaShell',
      'hulthen',
      'polarization',
      'tabulated',
      'expression',
      'contact',
      'hardSphere',
      'spinOrbit',
    ]);
    for (const form of FORMS) expect(formByKey(form.key)).toBe(form);
    expect(formByKey('toString')).toBeUndefined();
  });

  it.each(FORMS)('$key: formulas typeset, every text is there', (form) => {
    for (const tex of [form.formula, form.transformFormula]) {
      expect(() =>
        katex.renderToString(tex, { throwOnError: true, strict: 'error' }),
      ).not.toThrow();
    }
    for (const parameter of form.parameters) {
      expect(() => katex.renderToString(parameter.symbol, { throwOnError: true })).not.toThrow();
      expect(parameter.description.length).toBeGreaterThan(10);
    }
    expect(form.source).toMatch(/\d{4}/);
  });

  it.each(FORMS)('$key: builds from its defaults, which lie in their bounds', (form) => {
    const values = defaultValues(form);
    const term = form.build(values, CONTEXT);
    expect(term.form).toBe(form.key);
    expect(Number.isFinite(term.strength.re) && term.strength.re !== 0).toBe(true);
    if (term.noBorn === undefined) expect(term.closed?.(1).value).toBeGreaterThan(-Infinity);
    else expect(term).toMatchObject({ closed: null, quadrature: null });
  });
});
