import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { integrate } from '#server/physics/numerics/quadrature.ts';

interface Sample {
  name: string;
  f: (x: number) => number;
  from: number;
  to: number;
  exact: number;
  breakpoints?: number[];
  /** Bound the error must stay below, relative to the integral. */
  sane: number;
}

const SAMPLES: Sample[] = [
  { name: 'exponential', f: Math.exp, from: 0, to: 1, exact: Math.E - 1, sane: 2e-15 },
  {
    name: 'narrow Lorentzian',
    f: (x) => 1 / (1 + 1e6 * x * x),
    from: -1,
    to: 1,
    exact: (2 * Math.atan(1e3)) / 1e3,
    sane: 1e-13,
  },
  { name: 'logarithm at its end', f: Math.log, from: 0, to: 1, exact: -1, sane: 1e-12 },
  {
    name: 'inverse square root at its end',
    f: (x) => 1 / Math.sqrt(x),
    from: 0,
    to: 1,
    exact: 2,
    sane: 1e-12,
  },
  {
    name: 'kink without its breakpoint',
    f: (x) => Math.abs(x - 0.3),
    from: 0,
    to: 1,
    exact: 0.29,
    sane: 1e-12,
  },
  {
    name: 'jump at its breakpoint',
    f: (x) => (x < 0.3 ? 1 : 0),
    from: 0,
    to: 1,
    exact: 0.3,
    breakpoints: [0.3, 7],
    sane: 2e-15,
  },
  {
    name: 'normal distribution to infinity',
    f: (x) => Math.exp(-x * x),
    from: 0,
    to: Infinity,
    exact: Math.sqrt(Math.PI) / 2,
    sane: 1e-12,
  },
  {
    name: 'slow tail to infinity',
    f: (x) => 1 / (1 + x * x),
    from: 0,
    to: Infinity,
    exact: Math.PI / 2,
    sane: 1e-12,
  },
  {
    name: 'eighty periods',
    f: (x) => Math.sin(x) ** 2,
    from: 0,
    to: 80 * Math.PI,
    exact: 40 * Math.PI,
    sane: 1e-12,
  },
];

describe('adaptive integral', () => {
  it.each(SAMPLES)('$name: the error bounds the deviation and is sane', (sample) => {
    const { f, from, to, exact, breakpoints = [], sane } = sample;
    const result = integrate(f, from, to, { breakpoints });
    expect(result.status).toBe('converged');
    expect(Math.abs(result.value - exact)).toBeLessThanOrEqual(
      result.error + 1.2e-16 * Math.abs(exact),
    );
    expect(result.error).toBeLessThanOrEqual(sane * Math.abs(exact));
  });

  it('is additive over any cut and changes sign with f', () => {
    const f = (x: number) => Math.cos(3 * x) * Math.exp(-x);
    fc.assert(
      fc.property(fc.double({ min: 0.1, max: 9.9, noNaN: true }), (cut) => {
        const whole = integrate(f, 0, 10);
        const left = integrate(f, 0, cut);
        const right = integrate(f, cut, 10);
        const bound = whole.error + left.error + right.error;
        expect(Math.abs(whole.value - left.value - right.value)).toBeLessThanOrEqual(bound);
        expect(integrate((x) => -f(x), 0, cut).value).toBe(-left.value);
      }),
      { numRuns: 30 },
    );
  });

  it('says limited, with a bound that holds, when the work allowed is too small', () => {
    const result = integrate(Math.sqrt, 0, 1, { relative: 1e-15, maxEvaluations: 200 });
    expect(result.status).toBe('limited');
    expect(result.evaluations).toBeLessThanOrEqual(200);
    expect(Math.abs(result.value - 2 / 3)).toBeLessThanOrEqual(result.error);
    expect(result.error).toBeGreaterThan(1e-15);
  });

  it('says limited for an integral that is lost in its rounding', () => {
    const result = integrate(Math.sin, -1, 1);
    expect(result.status).toBe('limited');
    expect(Math.abs(result.value)).toBeLessThanOrEqual(result.error);
    expect(integrate(Math.sin, -1, 1, { absolute: 1e-12 }).status).toBe('converged');
  });

  it('fails on an integrand that is not finite, without a value', () => {
    const result = integrate((x) => (x > 0.5 ? NaN : 1), 0, 1);
    expect(result).toMatchObject({ status: 'failed', value: NaN, error: Infinity });
  });

  it('is zero on an empty interval and refuses ends that make none', () => {
    expect(integrate(Math.exp, 2, 2)).toMatchObject({ value: 0, error: 0, evaluations: 0 });
    expect(() => integrate(Math.exp, 1, 0)).toThrow(RangeError);
    expect(() => integrate(Math.exp, NaN, 1)).toThrow(RangeError);
    expect(() => integrate(Math.exp, 0, NaN)).toThrow(RangeError);
    expect(() => integrate(Math.exp, -Infinity, 0)).toThrow(RangeError);
  });
});
