import { describe, expect, test } from 'vitest';
import {
  effectiveFreedom,
  gumBudget,
  gumOutputs,
  meansOf,
} from '#server/physics/counting/statistics/gum.ts';
import { monteCarlo } from '#server/physics/counting/statistics/monte-carlo.ts';
import type { DistributedInput } from '#server/physics/counting/statistics/monte-carlo.ts';
import { generator, generatorFrom } from '#server/physics/counting/statistics/generator.ts';
import { studentInterval } from '#server/physics/numerics/distributions.ts';
import { refusal } from '#tests/physics/tables/refusal.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

describe('GUM (JCGM 100:2008)', () => {
  test('H.2: resistance and reactance from simultaneous readings', () => {
    const { inputs, correlations } = meansOf({
      V: [5.007, 4.994, 5.005, 4.99, 4.999],
      I: [19.663, 19.639, 19.64, 19.685, 19.678].map((mA) => mA * 1e-3),
      phi: [1.0456, 1.0438, 1.0468, 1.0428, 1.0433],
    });
    const { estimates, uncertainties, correlation } = gumOutputs(
      [
        ([V = 0, I = 0, phi = 0]) => (V / I) * Math.cos(phi),
        ([V = 0, I = 0, phi = 0]) => (V / I) * Math.sin(phi),
        ([V = 0, I = 0]) => V / I,
      ],
      inputs,
      correlations,
    );
    expect(estimates.map((one) => Number(one.toFixed(3)))).toEqual([127.732, 219.847, 254.26]);
    expect(uncertainties.map((one) => Number(one.toFixed(3)))).toEqual([0.071, 0.296, 0.236]);
    expect(uncertainties[1]?.toFixed(4)).toBe('0.2956');
    const between = [correlation[0]?.[1], correlation[0]?.[2], correlation[1]?.[2]];
    expect(between.map((one) => Number(one?.toFixed(3)))).toEqual([-0.588, -0.485, 0.993]);
  });

  /** H.1: length of a gauge block against a standard; nm, mm and kelvin. */
  const inputs = [
    { name: 'ls', estimate: 50.000623, uncertainty: 25e-6, freedom: 18 },
    { name: 'd', estimate: 215e-6, uncertainty: 9.7e-6, freedom: 25.6 },
    { name: 'alphaDifference', estimate: 0, uncertainty: 1e-6 / Math.sqrt(3), freedom: 50 },
    { name: 'thetaDifference', estimate: 0, uncertainty: 0.05 / Math.sqrt(3), freedom: 2 },
    { name: 'alpha', estimate: 11.5e-6, uncertainty: 1.2e-6, freedom: Infinity },
    { name: 'theta', estimate: -0.1, uncertainty: 0.41, freedom: Infinity },
  ];
  const length = ([ls = 0, d = 0, da = 0, dt = 0, a = 0, t = 0]: readonly number[]) =>
    ls + d - ls * (da * t + a * dt);

  test('H.1: 50.000838 mm, 32 nm, 16 degrees of freedom, 2.92, 93 nm', () => {
    const found = gumBudget(length, inputs, [], 0.99);
    expect(found.estimate.toFixed(6)).toBe('50.000838');
    expect(Math.round(found.combined * 1e6)).toBe(32);
    expect(Math.floor(found.freedom ?? NaN)).toBe(16);
    expect(found.coverageFactor.toFixed(2)).toBe('2.92');
    // 2.92 times the rounded 32 nm in print, 92.5 nm without rounding on the way.
    expectRelative(found.expanded * 1e6, 93, 1e-2);
    const nm = found.lines.map(({ contribution }) => Number((contribution * 1e6).toPrecision(2)));
    expect(nm).toEqual([25, 9.7, 2.9, 17, 0, 0]);
  });

  test('H.1: u(d) of 9.7 nm has 25.6 degrees of freedom', () => {
    const parts = [
      { contribution: 5.8, freedom: 24 },
      { contribution: 3.9, freedom: 5 },
      { contribution: 6.7, freedom: 8 },
    ];
    // In print from the rounded 9.7 nm.
    expectRelative(effectiveFreedom(parts), 25.6, 1e-2);
  });

  test('table G.2: Student quantiles (JCGM 100), and the normal one', () => {
    expect(studentInterval(0.95, 4).toFixed(2)).toBe('2.78');
    expect(studentInterval(0.95, 16).toFixed(2)).toBe('2.12');
    expect(studentInterval(0.6827, 1).toFixed(2)).toBe('1.84');
    expect(studentInterval(0.99, 16).toFixed(4)).toBe('2.9208');
    expectRelative(studentInterval(0.95, Infinity), 1.959963984540054, 1e-13);
    // ν = 1 is the Cauchy distribution, ν = 2 has a closed quantile.
    expectRelative(studentInterval(0.8, 1), Math.tan(0.4 * Math.PI), 1e-11);
    expectRelative(studentInterval(0.8, 2), 0.8 * Math.sqrt(2 / (1 - 0.64)), 1e-11);
  });

  test('a common source adds up, it does not go in quadrature', () => {
    const two = ['a', 'b'].map((name) => ({ name, estimate: 1, uncertainty: 0.1, freedom: 10 }));
    const sum = ([a = 0, b = 0]: readonly number[]) => a + b;
    const apart = gumBudget(sum, two);
    const together = gumBudget(sum, two, [{ between: ['a', 'b'], coefficient: 1 }]);
    expectRelative(apart.combined, 0.1 * Math.SQRT2, 1e-12);
    expectRelative(together.combined, 0.2, 1e-12);
    expect(together.freedom).toBeNull();
    expectRelative(apart.freedom ?? NaN, 20, 1e-10);
  });

  test('refusals', () => {
    const one = [{ name: 'a', estimate: 1, uncertainty: -1, freedom: 1 }];
    expect(refusal(() => gumBudget(([a = 0]) => a, one))).toMatch(/not negative/);
    const two = [{ name: 'a', estimate: 1, uncertainty: 1, freedom: 1 }];
    const wrong = [{ between: ['a', 'b'] as const, coefficient: 0.5 }];
    expect(refusal(() => gumBudget(([a = 0]) => a, two, wrong))).toMatch(/two inputs/);
  });
});

describe('Monte Carlo (JCGM 101:2008)', () => {
  const four = (distribution: 'normal' | 'rectangular'): DistributedInput[] =>
    [1, 2, 3, 4].map((i) => ({ name: `X${i}`, estimate: 0, uncertainty: 1, distribution }));
  const sum = (x: readonly number[]) => x.reduce((total, one) => total + one, 0);
  const run = (distribution: 'normal' | 'rectangular') => {
    const found = monteCarlo(sum, four(distribution), { trials: 300_000, seed: 7 });
    if (!found) throw new Error('it was not stopped');
    return found;
  };

  test.each([
    ['rectangular', 2 * Math.sqrt(3) * (2 - (3 / 5) ** 0.25)],
    ['normal', 2 * 1.959963984540054],
  ] as const)('9.2: the sum of four %s inputs of unit variance lies within %d', (kind, half) => {
    const { mean, deviation, interval, shortest, meanError } = run(kind);
    expect(Math.abs(mean)).toBeLessThan(4 * meanError);
    expectRelative(deviation, 2, 6e-3);
    // An end scatters by 0.01 with so many trials, those of the shortest interval by three times that.
    expect(Math.abs(interval[1] - half)).toBeLessThan(0.04);
    expect(Math.abs(interval[0] + half)).toBeLessThan(0.04);
    expectRelative((shortest[1] - shortest[0]) / 2, half, 1e-2);
    expect(shortest[1] - shortest[0]).toBeLessThanOrEqual(interval[1] - interval[0]);
  });

  test('9.2: the printed ends, 3.88 and 3.92', () => {
    expectRelative(2 * Math.sqrt(3) * (2 - (3 / 5) ** 0.25), 3.879407, 1e-7);
    expect(run('rectangular').interval[1].toFixed(1)).toBe('3.9');
  });

  test('the same seed gives the same numbers, another one others', () => {
    const draw = (seed: number) =>
      monteCarlo(sum, four('normal'), { trials: 2000, seed })?.mean ?? NaN;
    expect(draw(5)).toBe(draw(5));
    expect(draw(5)).not.toBe(draw(6));
  });

  test('it can be followed and stopped', () => {
    const seen: number[] = [];
    const found = monteCarlo(sum, four('normal'), {
      trials: 100_000,
      seed: 1,
      onBlock: (done) => {
        seen.push(done);
        return done < 30_000;
      },
    });
    expect(found).toBeNull();
    expect(seen).toEqual([10_000, 20_000, 30_000]);
  });

  test.each(['normal', 'rectangular', 'triangular', 'arcsine', 'student'] as const)(
    '%s draws have the mean and the variance they should',
    (distribution) => {
      const inputs: DistributedInput[] = [
        { name: 'x', estimate: 3, uncertainty: 0.5, distribution, freedom: 9 },
      ];
      const found = monteCarlo(([x = 0]) => x, inputs, { trials: 200_000, seed: 3 });
      const spread = distribution === 'student' ? 0.5 * Math.sqrt(9 / 7) : 0.5;
      expectRelative(found?.mean ?? NaN, 3, 2e-3);
      expectRelative(found?.deviation ?? NaN, spread, 1e-2);
    },
  );

  test('correlated inputs', () => {
    const two: DistributedInput[] = ['a', 'b'].map((name) => ({
      name,
      estimate: 0,
      uncertainty: 1,
      distribution: 'normal',
    }));
    const difference = monteCarlo(([a = 0, b = 0]) => a - b, two, {
      trials: 100_000,
      seed: 2,
      correlations: [{ between: ['a', 'b'], coefficient: 0.8 }],
    });
    expectRelative(difference?.deviation ?? NaN, Math.sqrt(2 - 1.6), 1e-2);
  });

  test('agrees with the law of propagation where the model is nearly straight, and not where it bends', () => {
    const inputs: DistributedInput[] = [
      { name: 'a', estimate: 10, uncertainty: 0.1, distribution: 'normal' },
      { name: 'b', estimate: 0, uncertainty: 1, distribution: 'normal' },
    ];
    const straight = monteCarlo(([a = 0]) => a ** -2, inputs, { trials: 100_000, seed: 4 });
    expectRelative(straight?.deviation ?? NaN, 2e-4, 2e-2);
    const bent = monteCarlo(([, b = 0]) => b * b, inputs, { trials: 100_000, seed: 4 });
    expectRelative(bent?.mean ?? NaN, 1, 2e-2);
    const known = inputs.map((one) => ({ ...one, freedom: Infinity }));
    expect(gumBudget(([, b = 0]) => b * b, known).combined).toBeLessThan(1e-9);
  });

  test('refusals', () => {
    const options = { trials: 10, seed: 1 };
    expect(refusal(() => monteCarlo(sum, four('normal'), options))).toMatch(/1,000/);
    const lost = () =>
      monteCarlo(([x = 0]) => Math.log(x), four('normal'), { trials: 1000, seed: 1 });
    expect(refusal(lost)).toMatch(/too uncertain/);
  });
});

describe('random numbers', () => {
  test('xoshiro128** from the state 1, 2, 3, 4, by an independent program in integer arithmetic', () => {
    const { bits } = generatorFrom([1, 2, 3, 4]);
    expect(Array.from({ length: 10 }, () => bits())).toEqual([
      11520, 0, 5927040, 70819200, 2031721883, 1637235492, 1287239034, 3734860849, 3729100597,
      4258142804,
    ]);
  });

  test('uniform numbers fill the unit interval evenly', () => {
    const { uniform } = generator(11);
    const bins = Array.from({ length: 20 }, () => 0);
    let outside = 0;
    for (let i = 0; i < 100_000; i++) {
      const u = uniform();
      outside += u > 0 && u < 1 ? 0 : 1;
      const bin = Math.floor(20 * u);
      bins[bin] = (bins[bin] ?? 0) + 1;
    }
    expect(outside).toBe(0);
    const chi2 = bins.reduce((sum, n) => sum + (n - 5000) ** 2 / 5000, 0);
    // 19 degrees of freedom: beyond 43.8 once in a thousand seeds.
    expect(chi2).toBeLessThan(43.8);
  });

  test('a seed is a whole number', () => {
    expect(() => generator(1.5)).toThrow(RangeError);
    expect(() => generator(-1)).toThrow(RangeError);
  });
});
