import { describe, expect, it } from 'vitest';
import { firstBorn } from '#server/physics/methods/born1.ts';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import { DomainError } from '#shared/errors.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { build, CONTEXT, transform, unitTerm } from './build-term.ts';

describe('hulthen', () => {
  it('∫ s dr from near the origin on: -a ln(x - x²/2 + x³/6), finite however small x = from/a', () => {
    const { lineIntegral } = unitTerm('hulthen', { a: 0.7 });
    for (const x of [1e-30, 1e-17, 1e-10, 1e-4]) {
      const exact = -0.7 * (Math.log(x) + Math.log1p(-x / 2 + x ** 2 / 6));
      expectRelative(lineIntegral(0.7 * x) ?? NaN, exact, 1e-13);
    }
    // Far out one exponential is left.
    expectRelative(lineIntegral(28) ?? NaN, 0.7 * Math.exp(-40), 1e-13);
  });

  it('is a geometric series of exponentials', () => {
    const term = unitTerm('hulthen', { a: 0.7 });
    for (const q of [0, 0.4, 3]) {
      const [a, last] = [0.7, 2000];
      // What is left out is 2a³ Σ n^-3 to the order 1/N⁴.
      let sum = a ** 3 / (last + 0.5) ** 2;
      for (let n = last; n >= 1; n--) {
        sum += transform(unitTerm('exponential', { a: a / n }), 'closed', q).value;
      }
      expectRelative(transform(term, 'closed', q).value, sum, 1e-11);
    }
  });

  it('S(0) = 2 zeta(3) a³ with zeta(3) = 1.2020569032 (Abramowitz and Stegun, table 23.3)', () => {
    expectRelative(
      transform(unitTerm('hulthen', { a: 1 }), 'closed', 0).value,
      2.4041138063,
      1e-10,
    );
  });

  it('goes over into the limit q = 0 without a step, and into a²·a/q² far out, where V0 a/r is left', () => {
    const term = unitTerm('hulthen', { a: 1 });
    const at = (q: number) => transform(term, 'closed', q).value;
    for (const q of [1e-300, 1e-101, 1e-99, 1e-12, 1e-8]) expectRelative(at(q), at(0), 3e-15);
    expectRelative(at(1e6) * 1e12, 1, 1e-6);
  });
});

describe('polarization', () => {
  const d = 0.9;
  const term = unitTerm('polarization', { d });

  it('moments and line integral are those of v', () => {
    const v = term.v ?? (() => NaN);
    const far = { scale: d, breakpoints: [d, 4 * d] };
    expectRelative(term.norm, integrate((r) => r * r * v(r), 0, Infinity, far).value, 1e-12);
    expectRelative(
      term.firstMoment ?? NaN,
      integrate((r) => r * v(r), 0, Infinity, far).value,
      1e-12,
    );
    for (const from of [0.01, 0.9, 1.79, 1.81, 30]) {
      const direct = integrate(v, from, Infinity, { scale: from }).value;
      expectRelative(term.lineIntegral(from) ?? NaN, direct, 1e-12);
    }
    expectRelative(v(term.reach ?? NaN), 1e-17 * v(0), 1e-4);
    expect(term.tail).toBe('power');
  });

  it('far out V = -alpha e²/2r⁴: helium, 1.383 cubic bohr radii, at 10 bohr radii is -0.6915e-4 hartree', () => {
    const bohr = 0.529177210544;
    const helium = build('polarization', { alpha: 1.383 * bohr ** 3, d: 1e-3 * bohr });
    const v = helium.strength.re * (helium.v?.(10 * bohr) ?? NaN);
    expectRelative(v, -0.6915e-4 * 27.211386245981, 1e-7);
  });

  it('attracts, and has the cusp in q that r^-4 leaves: dS/dq at 0 is -π/4', () => {
    const at = (q: number) => transform(term, 'closed', q).value;
    expectRelative((at(1e-7) - at(0)) / 1e-7, -Math.PI / 4, 1e-6);
    const f = firstBorn([term], CONTEXT.twoMuOverHbar2).amplitude(1);
    expect(f?.re).toBeGreaterThan(0);
  });
});

describe('hardSphere', () => {
  const term = build('hardSphere', { R: 2 });

  it('has a wall and no first order, and says why', () => {
    expect(term).toMatchObject({ closed: null, quadrature: null, reach: 2, tail: 'compact' });
    expect([term.v?.(1.99), term.v?.(2.01)]).toEqual([Infinity, 0]);
    expect(term.noBorn).toContain('infinitely strong');
  });

  it('is refused by the first Born amplitude with that reason', () => {
    const born = firstBorn([term], CONTEXT.twoMuOverHbar2);
    expect(() => born.amplitude(1)).toThrow(DomainError);
    expect(() => born.amplitude(1)).toThrow(/partial waves/);
  });
});
