import { describe, expect, it } from 'vitest';
import { COULOMB_EV_ANGSTROM } from '#server/physics/constants/codata2022.ts';
import type { Term } from '#server/physics/potentials/types.ts';
import { CONTRACT_BODY, answer, born1, dcsAt } from '#tests/physics/observables/bodies.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { build } from '../build-term.ts';
import { PARAMETERS, Q, formula } from './formulas.ts';

function transform(term: Term, q: number) {
  const result = term.closed?.(q);
  if (!result) throw new Error('no transform');
  return result;
}

/** Half of Im 1/(1 - ix)². */
const lorentz = (x: number) => x / (1 + x * x) ** 2;

/** S(q) of a formula against one worked out by hand; lengths in angstrom, energies in eV. */
const BY_HAND: [string, (q: number) => number][] = [
  ['V0*cos(r/a)*exp(-r/a)', (q) => (-10 * (lorentz(q + 1) + lorentz(q - 1))) / q],
  [
    'V0*(1 - (2/3)*(r/a)^2)*exp(-(r/a)^2)',
    (q) => (-10 * Math.sqrt(Math.PI) * q * q * Math.exp((-q * q) / 4)) / 24,
  ],
  ['V0*(a/r)^2*exp(-r/a)', (q) => (-10 * Math.atan(q)) / q],
  ['V0*max(0, 1 - r/a)', (q) => (-10 * (2 - 2 * Math.cos(q) - q * Math.sin(q))) / q ** 4],
  ['V0*exp(-b*r)', (q) => (-10 * 2 * 2) / (4 + q * q) ** 2],
];

describe('formulas against transforms worked out by hand', () => {
  it.each(BY_HAND)('%s', (text, expected) => {
    const term = formula(text);
    for (const q of [0.3, 1, 2.5, 6]) {
      const { value, error } = transform(term, q);
      expect(Math.abs(value - expected(q))).toBeLessThanOrEqual(
        error + 1e-12 * Math.abs(expected(q)),
      );
      expectRelative(value, expected(q), 1e-10);
    }
  });

  it('a thin shell far out is not overlooked', () => {
    const term = formula('V0*exp(-((r - far)/thin)^2)');
    const at = (q: number) => {
      const spread = Math.exp(-((q * 1e-3) ** 2) / 4);
      const shift = (1e-6 * q * Math.cos(1000 * q)) / 2;
      return (-10 * Math.sqrt(Math.PI) * 1e-3 * spread * (1000 * Math.sin(1000 * q) + shift)) / q;
    };
    for (const q of [0.1234, 0.777, 3]) expectRelative(transform(term, q).value, at(q), 1e-8);
  });

  it('units do not matter: femtometres and MeV, a plain number, a composed unit', () => {
    const same = [
      formula('V0*exp(-r/a)', { V0: Q(-1e-5, 'MeV'), a: Q(1e5, 'fm') }),
      formula('-10*W*exp(-r/a)', { W: Q(1, 'eV'), a: Q(0.1, 'nm') }),
      formula('g/a*exp(-r*b)', { g: Q(-10, 'eV angstrom'), a: Q(1, 'angstrom'), b: Q(10, '1/nm') }),
      formula('-sqrt(s)*exp(-r/a)', { s: Q(100, 'eV eV'), a: Q(1, 'angstrom') }),
    ];
    for (const term of same) expectRelative(transform(term, 1).value, -5, 1e-14);
  });

  it('a printed minus and a printed times sign are read', () => {
    expectRelative(transform(formula('V0·exp(−r/a)'), 1).value, -5, 1e-14);
  });
});

describe('tails', () => {
  it('c/r is recognised, alone and with what it leaves', () => {
    const alone = formula('k/r');
    expect(alone).toMatchObject({ coulombTail: 14.4, tail: 'coulomb', norm: 0, reach: null });
    expectRelative(transform(alone, 2).value, 3.6, 1e-14);
    expect(transform(alone, 0).value).toBe(Infinity);
    const screened = formula('k/r*(1 - exp(-r/a))');
    expect(screened.coulombTail).toBe(14.4);
    for (const q of [0.5, 2, 5]) {
      const { value, error } = transform(screened, q);
      const expected = 14.4 / (q * q) - 14.4 / (1 + q * q);
      expect(Math.abs(value - expected)).toBeLessThanOrEqual(error);
      expectRelative(value, expected, 1e-9);
    }
  });

  it('the point charge as a formula is the coulomb form: same curve, same divergences', () => {
    const k = { k: Q(-2 * COULOMB_EV_ANGSTROM, 'eV angstrom') };
    const body = (term: object) => ({
      ...CONTRACT_BODY,
      angles: { values: [10, 60, 180] },
      interaction: { terms: [term] },
    });
    const typed = answer(body({ form: 'expression', formula: 'k/r', parameters: k }));
    const own = answer(body({ form: 'coulomb', chargeProduct: -2 }));
    for (const theta of [10, 60, 180])
      expectRelative(dcsAt(typed, theta), dcsAt(own, theta), 1e-13);
    expect(born1(typed).elastic).toEqual(born1(own).elastic);
  });

  it('a power of r is followed to its end: against the polarization form', () => {
    const alpha = 1.5;
    const own = build('polarization', { alpha, d: 0.5 });
    const typed = formula('-alpha/2*e2/(r^2 + d^2)^2', {
      alpha: Q(alpha, 'angstrom3'),
      e2: Q(COULOMB_EV_ANGSTROM, 'eV angstrom'),
      d: Q(0.5, 'angstrom'),
    });
    expect(typed.tail).toBe('power');
    for (const q of [0, 0.01, 0.4, 1, 5, 12]) {
      const { value, error } = transform(typed, q);
      const expected = own.strength.re * transform(own, q).value;
      expect(Math.abs(value - expected)).toBeLessThanOrEqual(error + 1e-14 * Math.abs(expected));
      expectRelative(value, expected, 1e-9);
    }
  });

  it('a formula without strength does nothing, and is not refused', () => {
    for (const text of ['V0*0', '0', 'V0*exp(-r/a) - V0*exp(-r/a)']) {
      const term = formula(text);
      expect(term.strength).toEqual({ re: 0, im: 0 });
    }
    const parameters = { ...PARAMETERS, V0: Q(0, 'eV') };
    expect(formula('V0*exp(-r/a)', parameters).strength.re).toBe(0);
  });
});
