import { describe, expect, test } from 'vitest';
import {
  incompleteBeta,
  normalBelow,
  normalQuantile,
} from '#server/physics/numerics/distributions.ts';
import {
  incompleteGamma,
  inverseGamma,
  logGamma,
} from '#server/physics/numerics/incomplete-gamma.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

describe('ln Γ', () => {
  test.each([
    [0.25, Math.log(3.625609908221908)],
    [0.5, Math.log(Math.PI) / 2],
    [10, Math.log(362_880)],
    [100, 359.1342053695754],
  ])('at %d (Γ(¼): Abramowitz and Stegun 6.1.10; 99! by sums of logarithms)', (x, expected) => {
    expectRelative(logGamma(x), expected, 1e-14);
  });

  test('vanishes at 1 and 2 and obeys its recurrence', () => {
    expect(Math.abs(logGamma(1))).toBeLessThan(1e-14);
    expect(Math.abs(logGamma(2))).toBeLessThan(1e-14);
    for (const x of [0.1, 1.7, 11.9, 340.2]) {
      expect(Math.abs(logGamma(x + 1) - logGamma(x) - Math.log(x))).toBeLessThan(1e-12);
    }
    expect(() => logGamma(0)).toThrow(RangeError);
  });
});

describe('incomplete gamma functions', () => {
  test.each([0.3, 1, 7, 40])('whole a: Poisson sums, x = %d', (x) => {
    for (const n of [1, 2, 5, 30]) {
      let term = Math.exp(-x);
      let sum = 0;
      for (let i = 0; i < n; i++) {
        sum += term;
        term *= x / (i + 1);
      }
      expectRelative(incompleteGamma(n, x).upper, sum, 1e-12);
    }
  });

  test('a = ½ is the error function', () => {
    for (const z of [0.2, 1, 2.5]) {
      expectRelative(incompleteGamma(0.5, z * z).lower, 2 * normalBelow(z * Math.SQRT2) - 1, 1e-13);
    }
  });

  test('the inverse undoes it', () => {
    for (const a of [0.5, 1, 12, 5000]) {
      for (const p of [1e-6, 0.05, 0.5, 0.9, 0.999999]) {
        const { value } = inverseGamma(a, p);
        const { lower, upper } = incompleteGamma(a, value);
        if (p < 0.5) expectRelative(lower, p, 1e-9);
        else expectRelative(upper, 1 - p, 1e-9);
      }
    }
    expect(() => inverseGamma(1, 1)).toThrow(RangeError);
    expect(() => incompleteGamma(-1, 1)).toThrow(RangeError);
  });
});

describe('normal and beta', () => {
  test('quantiles of the normal distribution (Abramowitz and Stegun, table 26.5)', () => {
    expectRelative(normalQuantile(0.95), 1.6448536269514722, 1e-14);
    expectRelative(normalQuantile(0.975), 1.959963984540054, 1e-14);
    expect(normalQuantile(0.5)).toBe(0);
    for (const p of [1e-12, 0.01, 0.3, 0.8]) {
      expectRelative(normalBelow(normalQuantile(p)), p, 1e-12);
    }
    expect(() => normalQuantile(0)).toThrow(RangeError);
  });

  test('whole a and b: sums of the binomial distribution, and the mirror', () => {
    const choose = (n: number, k: number): number =>
      k === 0 ? 1 : (choose(n, k - 1) * (n - k + 1)) / k;
    for (const x of [0.1, 0.5, 0.83]) {
      let sum = 0;
      for (let k = 3; k <= 9; k++) sum += choose(9, k) * x ** k * (1 - x) ** (9 - k);
      expectRelative(incompleteBeta(3, 7, x), sum, 1e-13);
      expectRelative(incompleteBeta(2.5, 0.5, x) + incompleteBeta(0.5, 2.5, 1 - x), 1, 1e-14);
    }
    expect(() => incompleteBeta(0, 1, 0.5)).toThrow(RangeError);
  });
});
