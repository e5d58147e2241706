import { describe, expect, test } from 'vitest';
import {
  largestRecordedRate,
  recordedMeanRate,
  recordedRate,
  trueRates,
} from '#server/physics/counting/dead-time.ts';
import type { DeadTime } from '#server/physics/counting/dead-time.ts';
import { generator } from '#server/physics/counting/statistics/generator.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const free: DeadTime = { tau: 1e-6, model: 'nonParalysable' };
const paralysed: DeadTime = { tau: 1e-6, model: 'paralysable' };

describe('dead time', () => {
  test.each([
    [1e5, 90909.0909, 90483.7418],
    [5e5, 333333.33, 303265.33],
  ])(
    'a microsecond at %d a second (needs of a shift, rounded as printed)',
    (n, without, withIt) => {
      expectRelative(recordedRate(n, free), without, 2e-8);
      expectRelative(recordedRate(n, paralysed), withIt, 2e-8);
    },
  );

  test('the inverses of 90,000: 98901.10 and 99406.35', () => {
    expectRelative(trueRates(9e4, free)?.low ?? NaN, 98901.1, 2e-8);
    expectRelative(trueRates(9e4, paralysed)?.low ?? NaN, 99406.35, 5e-8);
  });

  test('the largest recorded rate of a paralysable counter: 367879.44 a second, where both true rates meet', () => {
    const most = largestRecordedRate(paralysed);
    expectRelative(most, 367879.44, 1e-8);
    const near = trueRates(most * (1 - 1e-12), paralysed);
    expectRelative(near?.low ?? NaN, 1e6, 1e-5);
    expectRelative(near?.high ?? NaN, 1e6, 1e-5);
    expect(trueRates(most * 1.0001, paralysed)).toBeNull();
    expect(trueRates(1e6, free)).toBeNull();
  });

  test('one recorded rate, two true ones', () => {
    for (const recorded of [1, 1e3, 1e5, 3.6e5]) {
      const { low, high } = trueRates(recorded, paralysed) ?? { low: NaN, high: NaN };
      expectRelative(recordedRate(low, paralysed), recorded, 1e-10);
      expectRelative(recordedRate(high ?? NaN, paralysed), recorded, 1e-10);
      expect(low).toBeLessThan(1e6);
      expect(high).toBeGreaterThan(1e6);
    }
    expect(trueRates(1e4, free)?.high).toBeNull();
  });

  test('both models start alike and a counter without dead time loses nothing', () => {
    const n = 1e3;
    expectRelative(1 - recordedRate(n, free) / n, 1e-3, 2e-3);
    expectRelative(1 - recordedRate(n, paralysed) / n, 1e-3, 2e-3);
    expect(recordedRate(n, { tau: 0, model: 'paralysable' })).toBe(n);
    expect(trueRates(n, { tau: 0, model: 'paralysable' })).toEqual({ low: n, high: null });
  });

  test('a pulsed beam loses what its rate inside the pulse loses', () => {
    expectRelative(recordedMeanRate(1e3, 0.01, free), 0.01 * recordedRate(1e5, free), 1e-15);
    expect(recordedMeanRate(1e3, 1, free)).toBe(recordedRate(1e3, free));
  });

  test.each([free, paralysed])('events thrown at random, $model', (deadTime) => {
    const { uniform } = generator(9);
    const rate = 4e5;
    let time = 0;
    let blocked = -1;
    let recorded = 0;
    for (let i = 0; i < 400_000; i++) {
      time -= Math.log(uniform()) / rate;
      const isLive = time >= blocked;
      if (isLive) recorded += 1;
      if (isLive || deadTime.model === 'paralysable') blocked = time + deadTime.tau;
    }
    expectRelative(recorded / time, recordedRate(rate, deadTime), 8e-3);
  });

  test('a rate that is none is refused', () => {
    expect(() => recordedRate(NaN, free)).toThrow(RangeError);
    expect(() => trueRates(-1, free)).toThrow(RangeError);
  });
});
