import { describe, expect, test } from 'vitest';
import type { RunPlan } from '#shared/contracts/run-plans.ts';
import { sheetInTime, sheetToAim, usableIn } from '#src/features/case/run-plan/model/run-sheet.ts';
import type {
  Sheet,
  SheetOrReason,
  SheetRules,
} from '#src/features/case/run-plan/model/run-sheet.ts';
import { clockText, sheetRows } from '#src/features/case/run-plan/model/sheet-rows.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const HOUR = 3600;
const NONE: SheetRules = { shift: 8 * HOUR, lostInShift: 0, setUp: 0 };
const s = (value: number) => ({ value, unit: 's' });

type Detector = RunPlan['detectors'][number];

/** Only what a sheet reads. */
function detector(name: string, angle: number, signal: number, blank: number): Detector {
  return {
    name,
    angle,
    solidAngle: 0.01,
    halfAngle: 3,
    averagedDcs: null,
    pointDcs: null,
    averaging: { acceptance: 1, energies: 1, attenuation: 1 },
    factors: [],
    product: null,
    trueRate: { value: 1, unit: '1/s' },
    observedRate: { value: 1, unit: '1/s' },
    deadTimeFraction: 0,
    instantaneousRate: { value: 1, unit: '1/s' },
    backgroundRate: { value: 0, unit: '1/s' },
    contributions: [],
    timeForPrecision: { signal: s(signal), blank: s(blank), total: s(signal + blank) },
    expectedCounts: { gross: 2 * signal, blank: 0.5 * blank },
    decisionThreshold: { unavailable: true, reason: 'not asked' },
    detectionLimit: { unavailable: true, reason: 'not asked' },
    uncertaintyBudget: [],
    combined: 0,
    combinedWithCounting: 0.01,
    expanded: { coverage: 0.95, freedom: null, coverageFactor: 1.96, relative: 0.02 },
    usefulTime: { unavailable: true, reason: 'not asked' },
    angleSensitivity: null,
    sameAngle: [],
  };
}

function plan(detectors: Detector[], beamTime?: number): RunPlan {
  const none = { unavailable: true as const, reason: 'not asked' };
  return {
    engine: { name: 'tallybarn', version: '0' },
    method: 'born1',
    arealDensity: { value: 1e15, unit: '1/cm2' },
    scatterer: 'C',
    beamRate: { value: 1e9, unit: '1/s' },
    atoms: [],
    target: {
      collisions: 0.01,
      multipleScattering: none,
      energyLoss: none,
      beamPower: { value: 1, unit: 'J/s' },
      depositedPower: none,
    },
    detectors,
    totalTime: none,
    totalTimeInTurn: none,
    runSheet: none,
    aim: { relativePrecision: 0.01, ...(beamTime !== undefined && { beamTime: s(beamTime) }) },
    verdict: 'feasible',
    decidedBy: { factor: 'time', message: '' },
    warnings: [],
  };
}

function sound(sheet: SheetOrReason): Sheet {
  if ('reason' in sheet) expect.fail(sheet.reason);
  return sheet;
}

const THREE = [
  detector('far', 120, 4 * HOUR, HOUR),
  detector('near', 10, HOUR, 0),
  detector('left', -30, 2 * HOUR, HOUR),
];

describe('to the precision aimed at', () => {
  test('positions follow one sweep of the angle, sample then blank, without a gap', () => {
    const { lines, whole, counting, shifts } = sound(sheetToAim(plan(THREE), NONE));
    expect(lines.map(({ name, what }) => `${name} ${what}`)).toEqual([
      'left sample',
      'left blank',
      'near sample',
      'far sample',
      'far blank',
    ]);
    expect(lines.map(({ start }) => start / HOUR)).toEqual([0, 2, 3, 4, 8]);
    expect([whole, counting]).toEqual([9 * HOUR, 9 * HOUR]);
    expect(shifts).toBe(2);
    expect(lines.map((line) => line.shifts)).toEqual([
      [1, 1],
      [1, 1],
      [1, 1],
      [1, 1],
      [2, 2],
    ]);
  });

  test('every shift begins with time that is lost, every position with its set-up', () => {
    const rules = { shift: 4 * HOUR, lostInShift: HOUR, setUp: 0.5 * HOUR };
    const sheet = sound(sheetToAim(plan(THREE), rules));
    // 3 h of each shift are usable: 9 h of counting and 1.5 h of set-up are three and a half of them.
    expect(sheet.shifts).toBe(4);
    expect(sheet.whole).toBe(3 * 4 * HOUR + HOUR + 1.5 * HOUR);
    expect(sheet.lines.map(({ start }) => start / HOUR)).toEqual([1.5, 3.5, 6, 7.5, 14.5 - 1]);
    expect(sheet.lines[3]?.shifts).toEqual([2, 4]);
  });

  test('counts are those of the answer', () => {
    const { lines } = sound(sheetToAim(plan(THREE), NONE));
    expect(lines.map(({ counts }) => counts)).toEqual([
      4 * HOUR,
      0.5 * HOUR,
      2 * HOUR,
      8 * HOUR,
      0.5 * HOUR,
    ]);
  });

  test('a position without a rate is named, with its reason', () => {
    const silent: Detector = {
      ...detector('dark', 5, 1, 1),
      timeForPrecision: { unavailable: true, reason: 'nothing is scattered there.' },
    };
    expect(sheetToAim(plan([silent]), NONE)).toEqual({
      reason: 'dark: nothing is scattered there.',
    });
  });
});

describe('equal precision in a given time', () => {
  const rules = { shift: 8 * HOUR, lostInShift: 0.5 * HOUR, setUp: HOUR / 6 };

  test.each([12, 24, 100])('%d h are used to the end, overheads among them', (hours) => {
    const sheet = sound(sheetInTime(plan(THREE, hours * HOUR), rules));
    expectRelative(sheet.whole, hours * HOUR, 1e-12);
    expectRelative(
      sheet.counting + 3 * rules.setUp + Math.ceil(hours / 8) * rules.lostInShift,
      hours * HOUR,
      1e-12,
    );
  });

  test('all positions reach the precision said: their times go as its inverse square', () => {
    const sheet = sound(sheetInTime(plan(THREE, 100 * HOUR), rules));
    for (const { name, signal, blank } of THREE.map(({ name: own, timeForPrecision: time }) => ({
      name: own,
      signal: 'unavailable' in time ? NaN : time.signal.value,
      blank: 'unavailable' in time ? NaN : time.blank.value,
    }))) {
      const given = sheet.lines
        .filter((line) => line.name === name)
        .reduce((sum, { time }) => sum + time, 0);
      expectRelative(given * sheet.precision ** 2, (signal + blank) * 0.01 ** 2, 1e-12);
    }
  });

  test('time that set-up eats whole gives no sheet', () => {
    expect(sheetInTime(plan(THREE, 0.9 * HOUR), rules)).toHaveProperty('reason');
    expect(sheetInTime(plan(THREE), rules)).toHaveProperty('reason');
  });

  test('usable time never falls while the clock goes on', () => {
    let before = 0;
    for (let time = 0; time <= 40 * HOUR; time += 0.1 * HOUR) {
      const now = usableIn(time, rules);
      expect(now).toBeGreaterThanOrEqual(before);
      before = now;
    }
    expectRelative(before, 5 * 7.5 * HOUR, 1e-12);
  });
});

test('the file has a header with units and a row a line', () => {
  const rows = sheetRows(sound(sheetToAim(plan(THREE), NONE)));
  expect(rows).toHaveLength(2 + 5);
  expect(rows.every((row) => row.length === rows[0]?.length)).toBe(true);
  expect(rows[2]).toEqual(['1', 'left', '-30', 'sample', '0', '7200', '14400', '1', '1']);
});

test.each([
  [0, '0:00'],
  [3599, '1:00'],
  [7500, '2:05'],
  [100 * HOUR, '100:00'],
])('%d seconds on the clock read %s', (seconds, text) => {
  expect(clockText(seconds)).toBe(text);
});
