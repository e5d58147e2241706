import { describe, expect, test } from 'vitest';
import { currieLimits } from '#server/physics/counting/statistics/currie.ts';
import { feldmanCousins } from '#server/physics/counting/statistics/feldman-cousins.ts';
import { K_95, characteristicLimits } from '#server/physics/counting/statistics/iso11929.ts';
import {
  garwoodInterval,
  poissonUpperLimit,
} from '#server/physics/counting/statistics/poisson-interval.ts';
import { refusal } from '#tests/physics/tables/refusal.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

describe('Currie', () => {
  test('exact coefficients: k = 1.644854, k² = 2.705543, 2 sqrt(2) k = 4.652349', () => {
    const { critical, detection } = currieLimits(1, 'paired');
    expectRelative(K_95, 1.644854, 3e-7);
    expectRelative(detection - 2 * critical, 2.705543, 3e-7);
    expectRelative(2 * critical, 4.652349, 3e-7);
  });

  test.each([
    [100, 23.3, 49.21, 200],
    [1000, 73.68, 149.76, 500],
  ])(
    'paired blank of %i counts, as printed with rounded coefficients (Currie 1968)',
    (b, c, d, q) => {
      const limits = currieLimits(b, 'paired');
      expectRelative(limits.critical, c, 2e-3);
      expectRelative(limits.detection, d, 5e-4);
      expectRelative(limits.determination, q, 1e-12);
    },
  );

  test('a well-known blank: L_D = 2.71 + 3.29 sqrt(B), L_Q = 50 (1 + sqrt(1 + B/25))', () => {
    const { critical, detection, determination } = currieLimits(100, 'wellKnown');
    expectRelative(critical, 16.4, 4e-3);
    expectRelative(detection, 2.71 + 32.9, 1e-3);
    expectRelative(determination, 50 * (1 + Math.sqrt(5)), 1e-12);
  });

  test('without a blank 2.71 counts are detected, and a negative blank is refused', () => {
    expectRelative(currieLimits(0, 'paired').detection, 2.71, 2e-3);
    expect(currieLimits(0, 'paired').critical).toBe(0);
    expect(refusal(() => currieLimits(-1, 'paired'))).toMatch(/not negative/);
  });
});

describe('ISO 11929', () => {
  const counted = { background: 0.1, grossTime: 1000, blankTime: 1000, factor: 1 };

  test('100 counts of background in 1000 s: 0.0232617 and 0.0492290 a second; 0.0505980 with a factor known to 10 %', () => {
    const exact = characteristicLimits({ ...counted, factorUncertainty: 0 });
    expectRelative(exact.decisionThreshold, 0.0232617, 2e-6);
    expectRelative(exact.detectionLimit ?? NaN, 0.049229, 2e-6);
    const vague = characteristicLimits({ ...counted, factorUncertainty: 0.1 });
    expectRelative(vague.detectionLimit ?? NaN, 0.050598, 2e-6);
    expect(vague.decisionThreshold).toBe(exact.decisionThreshold);
  });

  test.each([
    [0, 1],
    [0.1, 3],
    [0.4, 0.2],
  ])('solves y# = y* + k u(y#), relative uncertainty %d, factor %d', (u, w) => {
    const measured = { background: 0.3, grossTime: 500, blankTime: 900, factor: w };
    const { decisionThreshold, detectionLimit } = characteristicLimits({
      ...measured,
      factorUncertainty: u,
    });
    const y = detectionLimit ?? NaN;
    const variance = w ** 2 * ((y / w + 0.3) / 500 + 0.3 / 900) + (y * u) ** 2;
    expectRelative(y, decisionThreshold + K_95 * Math.sqrt(variance), 1e-12);
    expectRelative(decisionThreshold, K_95 * w * Math.sqrt(0.3 / 500 + 0.3 / 900), 1e-14);
  });

  test('no limit exists where k u(w) is one or more, and it grows without bound on the way', () => {
    const limit = (factorUncertainty: number) =>
      characteristicLimits({ ...counted, factorUncertainty }).detectionLimit;
    expect(limit(1 / K_95 + 1e-12)).toBeNull();
    expect(limit(0.8)).toBeNull();
    expect(limit(0.6)).toBeGreaterThan(10 * (limit(0) ?? NaN));
  });

  test('agrees with Currie for equal times', () => {
    const { decisionThreshold, detectionLimit } = characteristicLimits({
      ...counted,
      factorUncertainty: 0,
    });
    const { critical, detection } = currieLimits(100, 'paired');
    expectRelative(decisionThreshold * 1000, critical, 1e-14);
    expectRelative((detectionLimit ?? NaN) * 1000, detection, 1e-14);
  });

  test('refuses times that are none', () => {
    const words = refusal(() =>
      characteristicLimits({ ...counted, factorUncertainty: 0, blankTime: 0 }),
    );
    expect(words).toMatch(/counting times/);
  });
});

describe('few counts', () => {
  test.each([
    [0, 0, 1.841],
    [1, 0.173, 3.3],
    [3, 1.367, 5.918],
    [10, 6.891, 14.267],
  ])('Garwood, 68.27 %%, %i counts: %d to %d (Garwood 1936)', (n, low, high) => {
    const found = garwoodInterval(n, 0.6827);
    expect(Number(found.low.toFixed(3))).toBe(low);
    expect(Number(found.high.toFixed(3))).toBe(high);
  });

  test('upper limits at 90 and 95 % (Review of Particle Physics, Statistics)', () => {
    const limits = (confidence: number) =>
      [0, 1, 2, 3].map((n) => Number(poissonUpperLimit(n, confidence).toFixed(3)));
    expect(limits(0.9)).toEqual([2.303, 3.89, 5.322, 6.681]);
    expect(limits(0.95)).toEqual([2.996, 4.744, 6.296, 7.754]);
  });

  test('the ends of an interval leave the tails they should: Poisson sums', () => {
    const below = (n: number, mean: number) => {
      let term = Math.exp(-mean);
      let sum = term;
      for (let i = 1; i <= n; i++) sum += term *= mean / i;
      return sum;
    };
    for (const n of [1, 4, 25, 60]) {
      const { low, high } = garwoodInterval(n, 0.9);
      expectRelative(1 - below(n - 1, low), 0.05, 1e-11);
      expectRelative(below(n, high), 0.05, 1e-11);
    }
  });

  test('large counts come near the square root', () => {
    const { low, high } = garwoodInterval(1_000_000, 0.6827);
    expectRelative((high - low) / 2, 1000, 1e-3);
  });

  test.each([
    [0, 0, 0, 2.44],
    [1, 0, 0.11, 4.36],
    [2, 0, 0.53, 5.91],
    [3, 0, 1.1, 7.42],
    [0, 3, 0, 1.08],
    [3, 3, 0, 4.42],
    [5, 3, 0, 6.99],
    [10, 3, 2.63, 13.5],
  ])('Feldman and Cousins, 90 %%, n = %i, b = %i: %d to %d (1998, table IV)', (n, b, low, high) => {
    const found = feldmanCousins(n, b, 0.9);
    expect(Number(found.low.toFixed(2))).toBe(low);
    expect(Number(found.high.toFixed(2))).toBe(high);
  });

  test('the upper end never rises with the background', () => {
    const ends = [0, 0.5, 1, 1.5, 2, 2.5, 3, 3.5, 4].map((b) => feldmanCousins(0, b, 0.9).high);
    ends.slice(1).forEach((end, i) => expect(end).toBeLessThanOrEqual((ends[i] ?? NaN) + 1e-9));
  });

  test('covers at least as often as it says', () => {
    for (const signal of [0.3, 1.7, 4.1]) {
      let covered = 0;
      let probability = Math.exp(-(signal + 1));
      for (let n = 0; n < 25; n++) {
        const { low, high } = feldmanCousins(n, 1, 0.9);
        if (low <= signal && signal <= high) covered += probability;
        probability *= (signal + 1) / (n + 1);
      }
      expect(covered).toBeGreaterThanOrEqual(0.9);
      expect(covered).toBeLessThan(0.99);
    }
  });

  test('counts that are none are refused', () => {
    expect(refusal(() => garwoodInterval(1.5, 0.9))).toMatch(/whole number/);
    expect(refusal(() => garwoodInterval(1, 1))).toMatch(/between 0 and 1/);
    expect(refusal(() => feldmanCousins(200, 0, 0.9))).toMatch(/square root/);
    expect(refusal(() => feldmanCousins(1, -1, 0.9))).toMatch(/background/);
  });
});
