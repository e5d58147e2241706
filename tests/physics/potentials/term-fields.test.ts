import { describe, expect, it } from 'vitest';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { build, CONTEXT, transform, unitTerm } from './build-term.ts';

const WITH_SHAPE: [string, Record<string, number>][] = [
  ['yukawa', { a: 0.8 }],
  ['screenedCoulomb', { a: 0.8 }],
  ['hulthen', { a: 0.8 }],
  ['moliere', { Z: 13 }],
  ['krc', { Z1: 2, Z2: 79 }],
  ['universalIon', { Z1: 2, Z2: 79 }],
  ['squareWell', { R: 0.8 }],
  ['gaussian', { a: 0.8 }],
  ['exponential', { a: 0.8 }],
  ['woodsSaxon', { R: 4, a: 0.65 }],
  ['woodsSaxon', { R: 0, a: 0.65 }],
  ['woodsSaxon', { R: 1, a: 3 }],
];

describe('what a term says of itself', () => {
  it.each(WITH_SHAPE)('%s %o: moments, line integral and reach are those of v', (form, lengths) => {
    const term = unitTerm(form, lengths);
    const { v, reach, range, breakpoints } = term;
    if (!v || reach === null || range === null) throw new Error('a shape with a reach is expected');
    const cuts = [...breakpoints, range / 2, range, 4 * range, 12 * range];
    const over = (f: (r: number) => number, from: number) =>
      integrate(f, from, 1.4 * reach, { breakpoints: cuts }).value;
    expectRelative(
      term.norm,
      over((r) => r * r * v(r), 0),
      1e-11,
    );
    expectRelative(
      term.firstMoment ?? NaN,
      over((r) => r * v(r), 0),
      1e-11,
    );
    for (const from of [0.05, 0.79, 3]) {
      const expected = from < reach ? over(v, from) : 0;
      if (expected === 0) expect(term.lineIntegral(from)).toBe(0);
      else expectRelative(term.lineIntegral(from) ?? NaN, expected, 1e-11);
    }
    expect(term.lineIntegral(1e6 * range)).toBe(0);
    expect(v(1.001 * reach)).toBeLessThanOrEqual(1e-17 * v(range / 1000));
    expect(v(range / 1000)).toBeGreaterThan(0);
    expectRelative(term.norm, transform(term, 'closed', 0).value, 2e-15);
  });

  it('takes complex strengths where the form has them', () => {
    for (const [form, lengths] of [
      ['squareWell', { R: 1 }],
      ['gaussian', { a: 1 }],
      ['woodsSaxon', { R: 1, a: 0.2 }],
    ] as const) {
      expect(build(form, { V0: -50, W0: -5, ...lengths }).strength).toEqual({ re: -50, im: -5 });
      expect(build(form, { V0: -50, ...lengths }).strength).toEqual({ re: -50, im: 0 });
      expect(build(form, { V0: 0, W0: 0, ...lengths }).strength).toEqual({ re: 0, im: 0 });
    }
  });

  it('coulomb: charges of the beam and target, or the product that wins', () => {
    // e²/(4πε0) = 14.3996455 eV angstrom, CODATA.
    expectRelative(build('coulomb', {}).strength.re, -2 * 14.3996455, 1e-8);
    expectRelative(build('coulomb', { chargeProduct: 158 }).strength.re, 158 * 14.3996455, 1e-8);
    expectRelative(build('screenedCoulomb', { a: 1 }).strength.re, -2 * 14.3996455, 1e-8);
    expect(build('coulomb', {})).toMatchObject({
      tail: 'coulomb',
      range: null,
      reach: null,
      norm: 0,
    });
  });

  it('deltaShell: integrals of a delta function, no V(r)', () => {
    const term = build('deltaShell', { g: -10, R: 2 });
    expect(term).toMatchObject({ v: null, strength: { re: -10, im: 0 }, firstMoment: 2, range: 2 });
    expect(term.noFunction).toContain('no function');
    expect([term.lineIntegral(1.9), term.lineIntegral(2.1)]).toEqual([1, 0]);
  });

  it('contact: f = -b at all angles and L³V = (2πħ²/mu) b', () => {
    const b = 6.646e-5;
    const term = build('contact', { b });
    for (const q of [0, 3, 1e6]) {
      const f = -CONTEXT.twoMuOverHbar2 * term.strength.re * transform(term, 'closed', q).value;
      expectRelative(f, -b, 1e-15);
    }
    expectRelative(
      4 * Math.PI * term.strength.re * transform(term, 'closed', 0).value,
      (4 * Math.PI * b) / CONTEXT.twoMuOverHbar2,
      1e-15,
    );
    expect(term).toMatchObject({ v: null, quadrature: null, tail: 'point', range: null });
  });
});
