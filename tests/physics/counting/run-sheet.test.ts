import { describe, expect, test } from 'vitest';
import { recordedRate } from '#server/physics/counting/dead-time.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { Q, SAID, plan, thinPlan, valueOf } from './plans.ts';

const detectors = [90, 30, 60].map((angle) => ({
  name: `${angle}`,
  angle,
  solidAngle: 1e-3,
  ...SAID,
  backgroundRate: Q(1, '1/s'),
}));
const body = (aim: object = {}) => ({
  ...thinPlan({ aim: { relativePrecision: 0.01, ...aim } }),
  detectors,
});

function total(one: { timeForPrecision: object } | undefined): number {
  const times = one?.timeForPrecision;
  return times && 'total' in times ? valueOf(times.total as object) : NaN;
}

describe('the run sheet', () => {
  const found = plan(body({ setupTime: Q(30, 'min'), shift: Q(4, 'h') }));
  const sheet = found.runSheet;
  if ('unavailable' in sheet) throw new Error(sheet.reason);

  test('goes by angle, each position after the one before and its overhead', () => {
    expect(sheet.positions.map(({ name }) => name)).toEqual(['30', '60', '90']);
    let clock = 0;
    for (const { name, start, setup, signal, blank, shift } of sheet.positions) {
      expectRelative(start.value, clock, 1e-12);
      expect(setup.value).toBe(1800);
      const own = found.detectors.find((one) => one.name === name);
      expectRelative(signal.value + blank.value, total(own), 1e-12);
      expect(shift).toBe(Math.floor(clock / 14_400) + 1);
      clock += setup.value + signal.value + blank.value;
    }
    expectRelative(sheet.total.value, clock, 1e-12);
    expect(sheet.shifts).toBe(Math.ceil(clock / 14_400));
  });

  test('without overhead it is as long as the plan in turn, shifts have eight hours', () => {
    const plain = plan(body());
    if ('unavailable' in plain.runSheet) throw new Error(plain.runSheet.reason);
    expectRelative(plain.runSheet.total.value, valueOf(plain.totalTimeInTurn), 1e-12);
    expect(plain.runSheet.shift).toEqual({ value: 28_800, unit: 's' });
  });

  test('all at once is the longest sample and the longest blank', () => {
    const plain = plan(body());
    expect(valueOf(plain.totalTime)).toBeLessThan(valueOf(plain.totalTimeInTurn));
    const slowest = Math.max(...plain.detectors.map(total));
    expect(valueOf(plain.totalTime)).toBeGreaterThanOrEqual(slowest * (1 - 1e-12));
  });
});

describe('background that comes with the beam', () => {
  const quiet = thinPlan({ aim: { relativePrecision: 0.01, beamTime: Q(100, 's') } });
  const at = (detector: object, beam: object = {}) => {
    const sent = { ...quiet, beam: { particlesPerSecond: 1e6, dutyFactor: 1, ...beam } };
    const [one] = plan({
      ...sent,
      detectors: [{ name: 'D', angle: 60, solidAngle: 1e-3, ...SAID, ...detector }],
    }).detectors;
    if (!one) throw new Error('one detector was sent');
    return one;
  };

  test('is background like any other at the planned current', () => {
    const byTime = at({ backgroundRate: Q(3, '1/s') });
    const byCharge = at({ backgroundRate: Q(1, '1/s'), beamBackgroundRate: Q(2, '1/s') });
    expect(byCharge.backgroundRate.value).toBe(3);
    expect(byCharge.timeForPrecision).toEqual(byTime.timeForPrecision);
  });

  test('more current brings more of it: the factor that is said reaches the precision', () => {
    const one = at({ backgroundRate: Q(1, '1/s'), beamBackgroundRate: Q(2, '1/s') });
    const { needed } = one;
    if (!needed || 'unavailable' in needed) throw new Error('a factor was asked for');
    const factor = needed.factorOfCurrent;
    if (typeof factor !== 'number') throw new Error(factor.reason);
    expect(factor).toBeGreaterThan(needed.factor);
    const more = at(
      { backgroundRate: Q(1, '1/s'), beamBackgroundRate: Q(2 * factor, '1/s') },
      { particlesPerSecond: needed.particlesPerSecond.value },
    );
    expectRelative(total(more), 100, 1e-8);
  });
});

describe('the recorded rate against the current', () => {
  const detector = {
    deadTime: Q(10, 'us'),
    deadTimeModel: 'paralysable',
    backgroundRate: Q(5, '1/s'),
  };
  const asked = (changes: object) =>
    plan(thinPlan({ beam: { particlesPerSecond: 1e9, dutyFactor: 1 }, ...changes }, detector));

  test('is there when asked for: signal times the factor, dead time on all of it', () => {
    const [one] = asked({ rateTable: true }).detectors;
    const table = one?.rateAgainstCurrent ?? [];
    expect(table).toHaveLength(13);
    expectRelative(table[0]?.factor ?? NaN, 0.01, 1e-12);
    expectRelative(table.at(-1)?.factor ?? NaN, 10, 1e-12);
    for (const { factor, observedRate, particlesPerSecond } of table) {
      const rate = (one?.trueRate.value ?? NaN) * factor + 5;
      expectRelative(observedRate, recordedRate(rate, { tau: 1e-5, model: 'paralysable' }), 1e-12);
      expectRelative(particlesPerSecond, 1e9 * factor, 1e-12);
    }
    const planned = table.find(({ factor }) => Math.abs(factor - 1) < 1e-12);
    expectRelative(planned?.observedRate ?? NaN, one?.observedRate.value ?? NaN, 1e-12);
  });

  test('and not otherwise', () => {
    expect(asked({}).detectors[0]).not.toHaveProperty('rateAgainstCurrent');
  });
});
