import { describe, expect, it } from 'vitest';
import {
  CONTRACT_BODY,
  answer,
  born1,
  dcsAt,
  integral,
} from '#tests/physics/observables/bodies.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { build } from '../build-term.ts';
import { Q, formula } from './formulas.ts';

const V0 = Q(-10, 'eV');
const a = Q(1, 'angstrom');
const R = Q(3, 'angstrom');
const LENGTHS = { V0: -10, a: 1 };

/** The same potential as a registered form and as a formula. */
const PAIRS: { form: string; text: string; values: Record<string, number>; sent: object }[] = [
  { form: 'yukawa', text: 'V0*exp(-r/a)/(r/a)', values: LENGTHS, sent: { V0, a } },
  { form: 'exponential', text: 'V0*exp(-r/a)', values: LENGTHS, sent: { V0, a } },
  { form: 'gaussian', text: 'V0*exp(-(r/a)^2)', values: LENGTHS, sent: { V0, a } },
  {
    form: 'woodsSaxon',
    text: 'V0/(1 + exp((r - R)/a))',
    values: { ...LENGTHS, R: 3 },
    sent: { V0, R, a },
  },
  { form: 'squareWell', text: 'r < R ? V0 : 0', values: { V0: -10, R: 3 }, sent: { V0, R } },
  {
    form: 'hulthen',
    text: 'V0*exp(-r/a)/(1 - exp(-r/a))',
    values: LENGTHS,
    sent: { V0, a },
  },
];
const WAVES = [0, 1e-7, 0.1, 0.5, 1, 3, 7, 20, 100];

describe.each(PAIRS)('$text is $form', ({ form, text, values, sent }) => {
  const own = build(form, values);
  const typed = formula(text);

  it('transforms agree within their bounds, to 1e-9 or to the floor', () => {
    const floor = 1e-14 * typed.norm;
    for (const q of WAVES) {
      const [x, y] = [typed.closed?.(q), own.closed?.(q)];
      if (!x || !y) throw new Error('no transform');
      const expected = own.strength.re * y.value;
      const distance = Math.abs(x.value - expected);
      expect(distance).toBeLessThanOrEqual(x.error + Math.abs(own.strength.re) * y.error);
      expect(distance).toBeLessThanOrEqual(Math.max(1e-9 * Math.abs(expected), floor));
      expect(x.error).toBeLessThanOrEqual(Math.max(1e-6 * Math.abs(expected), floor));
    }
  });

  it('the quadrature that samples V itself agrees within the bounds', () => {
    for (const q of WAVES) {
      const [x, z] = [typed.closed?.(q), typed.quadrature?.(q)];
      if (!x || !z) throw new Error('no transform');
      expect(Math.abs(x.value - z.value)).toBeLessThanOrEqual(x.error + z.error);
    }
  });

  it('moments, line integrals, tail and jumps are those of the form', () => {
    expectRelative(typed.norm, Math.abs(own.strength.re) * own.norm, 1e-9);
    expectRelative(typed.firstMoment ?? NaN, own.strength.re * (own.firstMoment ?? NaN), 1e-9);
    for (const from of [0.2, 1, 2.9]) {
      const expected = own.strength.re * (own.lineIntegral(from) ?? NaN);
      expectRelative(typed.lineIntegral(from) ?? NaN, expected, 1e-8);
    }
    expect(typed.tail).toBe(own.tail);
    expect(typed.breakpoints).toEqual(own.breakpoints);
    for (const r of [0.1, 1, 2.99, 5]) {
      expectRelative(typed.v?.(r) ?? NaN, own.strength.re * (own.v?.(r) ?? NaN), 1e-14);
    }
  });

  it('and so do the estimates: every angle, every integral, the golden rule and the verdict', () => {
    const body = (term: object) => ({ ...CONTRACT_BODY, interaction: { terms: [term] } });
    const one = answer(body({ form, ...sent }));
    const other = answer(body({ form: 'expression', formula: text, parameters: sent }));
    for (const theta of [0, 30, 60, 90, 180]) {
      const floor = 1e-14 * dcsAt(one, 0);
      const [x, y] = [dcsAt(one, theta), dcsAt(other, theta)];
      expect(Math.abs(x - y)).toBeLessThanOrEqual(1e-9 * x + floor ** 2 / dcsAt(one, 0));
    }
    for (const name of ['elastic', 'total', 'momentumTransfer', 'viscosity'] as const) {
      expectRelative(integral(born1(other)[name]).value, integral(born1(one)[name]).value, 1e-9);
    }
    if ('unavailable' in one.goldenRule || 'unavailable' in other.goldenRule)
      throw new Error('none');
    expectRelative(other.goldenRule.rate.value, one.goldenRule.rate.value, 1e-9);
    expect(other.goldenRule.quadratureCheck?.evaluations).toBeGreaterThan(0);
    expect(other.validity.verdict).toBe(one.validity.verdict);
  });
});
