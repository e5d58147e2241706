import { describe, expect, test } from 'vitest';
import { neededFor } from '#server/physics/counting/needed.ts';
import {
  bestShares,
  equalPrecision,
  precisionAfter,
  signalFor,
  timesForPrecision,
} from '#server/physics/counting/times.ts';
import type { CountedRates } from '#server/physics/counting/times.ts';
import { generator } from '#server/physics/counting/statistics/generator.ts';
import { judgePlan, spoken } from '#server/physics/counting/verdict.ts';
import type { PlanJudged } from '#server/physics/counting/verdict.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const rates = (changes: Partial<CountedRates> = {}): CountedRates => ({
  signal: 9,
  background: 1,
  deadTime: { tau: 0, model: 'nonParalysable' },
  dutyFactor: 1,
  ...changes,
});

describe('time for a precision', () => {
  test('without a blank: one over the rate and the squared precision', () => {
    const times = timesForPrecision(rates({ background: 0 }), 0.01);
    expectRelative(times?.signal ?? NaN, 1e4 / 9, 1e-14);
    expect(times?.blank).toBe(0);
  });

  test('sample to blank as the roots of gross and background, (sqrt(g) + sqrt(b))²/((g - b)² p²) in all', () => {
    const times = timesForPrecision(rates(), 0.02) ?? { signal: NaN, blank: NaN };
    expectRelative(times.signal / times.blank, Math.sqrt(10), 1e-14);
    const total = (Math.sqrt(10) + 1) ** 2 / (81 * 0.0004);
    expectRelative(times.signal + times.blank, total, 1e-13);
    expectRelative(precisionAfter(rates(), times), 0.02, 1e-13);
  });

  test.each([
    [9, 1],
    [0.3, 2],
    [100, 0.01],
  ])('no other share of the time does better: signal %d, background %d', (signal, background) => {
    const one = rates({ signal, background });
    const best = timesForPrecision(one, 0.05) ?? { signal: NaN, blank: NaN };
    const total = best.signal + best.blank;
    let brute = Infinity;
    let at = 0;
    for (let i = 1; i < 4000; i++) {
      const blank = (total * i) / 4000;
      const precision = precisionAfter(one, { signal: total - blank, blank });
      if (precision < brute) [brute, at] = [precision, blank];
    }
    expect(brute).toBeGreaterThanOrEqual(0.05 * (1 - 1e-12));
    expectRelative(brute, 0.05, 1e-5);
    expect(Math.abs(at - best.blank)).toBeLessThanOrEqual(total / 2000);
  });

  test('a counter with dead time needs longer, and reaches what it says', () => {
    const slow = rates({
      signal: 2e5,
      background: 1e4,
      deadTime: { tau: 1e-6, model: 'nonParalysable' },
    });
    const times = timesForPrecision(slow, 0.01) ?? { signal: NaN, blank: NaN };
    expectRelative(precisionAfter(slow, times), 0.01, 1e-12);
    const free = timesForPrecision(
      { ...slow, deadTime: { tau: 0, model: 'nonParalysable' } },
      0.01,
    );
    expect(times.signal).toBeGreaterThan(free?.signal ?? NaN);
  });

  test('counts thrown at random scatter by the precision that was aimed at', () => {
    const { normal } = generator(17);
    const one = rates({ signal: 40, background: 25 });
    const times = timesForPrecision(one, 0.03) ?? { signal: NaN, blank: NaN };
    const [gross, blank] = [65 * times.signal, 25 * times.blank];
    let square = 0;
    const runs = 20_000;
    for (let i = 0; i < runs; i++) {
      const n = gross + Math.sqrt(gross) * normal();
      const b = blank + Math.sqrt(blank) * normal();
      square += ((n / times.signal - b / times.blank) / 40 - 1) ** 2;
    }
    expectRelative(Math.sqrt(square / runs), 0.03, 0.02);
  });

  test('without a signal there is no time', () => {
    expect(timesForPrecision(rates({ signal: 0 }), 0.01)).toBeNull();
  });
});

describe('what is needed for a precision within a time', () => {
  test.each([
    [1, 0.02, 3600],
    [0, 0.01, 100],
    [30, 0.1, 50],
  ])('the signal that is said reaches it: background %d', (background, precision, time) => {
    const signal = signalFor(background, precision, time);
    const times = timesForPrecision(rates({ signal, background }), precision);
    expectRelative((times?.signal ?? NaN) + (times?.blank ?? NaN), time, 1e-12);
  });

  test('with dead time too', () => {
    const one = rates({
      signal: 5e3,
      background: 100,
      deadTime: { tau: 2e-6, model: 'paralysable' },
    });
    const factor = neededFor(one, 0.002, 10) ?? NaN;
    const times = timesForPrecision({ ...one, signal: one.signal * factor }, 0.002);
    expectRelative((times?.signal ?? NaN) + (times?.blank ?? NaN), 10, 1e-8);
    expect(factor).toBeGreaterThan(
      neededFor({ ...one, deadTime: { ...one.deadTime, tau: 0 } }, 0.002, 10) ?? NaN,
    );
  });

  test('a counter at its largest rate cannot be helped', () => {
    const slow = rates({ signal: 1e3, deadTime: { tau: 1e-3, model: 'paralysable' } });
    expect(neededFor(slow, 1e-3, 100)).toBeNull();
    expect(neededFor(rates({ signal: 0 }), 0.01, 10)).toBeNull();
  });
});

describe('a given beam time', () => {
  const positions = [rates(), rates({ signal: 2 }), rates({ signal: 0.5, background: 0.1 })];

  test('equal precision: every position reaches it, the times add up, and no other division is better for the worst', () => {
    const found = equalPrecision(positions, 1e5);
    if (!found) throw new Error('every position has a signal');
    const sum = found.times.reduce((all, { signal, blank }) => all + signal + blank, 0);
    expectRelative(sum, 1e5, 1e-12);
    positions.forEach((one, i) => {
      const times = found.times[i] ?? { signal: NaN, blank: NaN };
      expectRelative(precisionAfter(one, times), found.precision, 1e-12);
    });
    // Brute force over the shares of the three positions, each at its own best split.
    const cost = positions.map((one) => {
      const times = timesForPrecision(one, 1) ?? { signal: NaN, blank: NaN };
      return times.signal + times.blank;
    });
    let best = Infinity;
    for (let i = 1; i < 200; i++) {
      for (let j = 1; i + j < 200; j++) {
        const shares = [i, j, 200 - i - j].map((n) => (n * 1e5) / 200);
        const worst = Math.max(...shares.map((t, k) => Math.sqrt((cost[k] ?? NaN) / t)));
        best = Math.min(best, worst);
      }
    }
    expect(best).toBeGreaterThanOrEqual(found.precision * (1 - 1e-12));
    expectRelative(best, found.precision, 5e-2);
    expect(equalPrecision([rates({ signal: 0 })], 10)).toBeNull();
  });

  test('the best known weighted sum, against brute force', () => {
    const weights = [1, -2, 0.5];
    const variances = [4, 1, 9];
    const { times, variance } = bestShares(weights, variances, 60);
    expectRelative(
      times.reduce((sum, t) => sum + t, 0),
      60,
      1e-14,
    );
    const of = (shares: readonly number[]) =>
      weights.reduce((sum, w, i) => sum + (w * w * (variances[i] ?? NaN)) / (shares[i] ?? NaN), 0);
    expectRelative(of(times), variance, 1e-13);
    let best = Infinity;
    for (let i = 1; i < 120; i++) {
      for (let j = 1; i + j < 120; j++) {
        best = Math.min(best, of([i / 2, j / 2, 60 - (i + j) / 2]));
      }
    }
    expect(best).toBeGreaterThanOrEqual(variance * (1 - 1e-12));
    expectRelative(best, variance, 1e-3);
  });
});

describe('whether it can be done', () => {
  const judged = (
    changes: Partial<PlanJudged> = {},
    one: Partial<PlanJudged['detectors'][0]> = {},
  ) =>
    judgePlan({
      collisions: 0.01,
      precision: 0.01,
      beamTime: null,
      totalTime: 3600,
      detectors: [
        { name: 'D', total: 3600, reason: null, deadTimeFraction: 0, combined: 0, ...one },
      ],
      ...changes,
    });

  test.each([
    [judged(), 'feasible', 'time'],
    [judged({ totalTime: 3 * 86_400 }), 'tight', 'time'],
    [judged({ totalTime: 8 * 86_400 }), 'notFeasible', 'time'],
    [judged({ beamTime: 3600 }), 'tight', 'time'],
    [judged({ beamTime: 4500 }), 'feasible', 'time'],
    [judged({ beamTime: 3599 }), 'notFeasible', 'time'],
    [judged({ collisions: 1.01 }), 'singleScatteringNotValid', 'collisions'],
    [judged({ totalTime: null }, { total: null }), 'notFeasible', 'noSignal'],
    [judged({}, { deadTimeFraction: 0.6 }), 'tight', 'deadTime'],
    [judged({}, { combined: 0.02 }), 'tight', 'uncertainty'],
  ] as const)('%o', (decision, verdict, factor) => {
    expect(decision.verdict).toBe(verdict);
    expect(decision.factor).toBe(factor);
    expect(decision.message.length).toBeGreaterThan(20);
  });

  test('times are said as people plan them', () => {
    expect([30, 600, 20_000, 1.37e8].map(spoken)).toEqual(['30 s', '10 min', '5.56 h', '1590 d']);
  });
});
