import { describe, expect, test } from 'vitest';
import { computedSlip, judgeMixUp, usualSlips } from '#shared/mix-ups.ts';
import type { ComparedKind } from '#shared/mix-ups.ts';

const DEGREE = Math.PI / 180;

function explained(kind: ComparedKind, ratio: number, unit = 'angstrom2', theta = 60): string[] {
  const angle = kind === 'dcs' ? theta * DEGREE : null;
  const judged = judgeMixUp(ratio, 1, usualSlips(kind, unit, angle));
  return judged.verdict === 'explained' ? judged.by.map(({ key }) => key) : [judged.verdict];
}

// The factors of needs.md, J2, typed as they are quoted.
describe('the usual slips, by their factors', () => {
  test.each([
    ['dcs', 12.566, 'angstrom2', 'per steradian'],
    ['total', 1 / 12.566, 'barn', 'per steradian inverse'],
    ['dcs', 6.283, 'barn', 'azimuth'],
    ['dcs', 39.48, 'barn', 'planck'],
    // A number of bohr² under the label of angstrom², and the other way round.
    ['total', 1 / 0.280029, 'angstrom2', 'unit bohr2'],
    ['total', 0.280029, 'bohr2', 'unit angstrom2'],
    // Angstrom² labelled barn, barn labelled angstrom².
    ['total', 1e-8, 'barn', 'unit angstrom2'],
    ['total', 1e8, 'angstrom2', 'unit barn'],
    // Fermi² and millibarn.
    ['dcs', 10, 'fm2', 'unit millibarn'],
    ['dcs', 0.1, 'millibarn', 'unit fm2'],
    ['total', 2, 'barn', 'counted twice'],
    ['dcs', 0.25, 'barn', 'exchange inverse'],
    // 2π sin 60°, and the same in degrees.
    ['dcs', 5.4414, 'barn', 'per radian'],
    ['dcs', 0.09497, 'barn', 'per degree'],
  ] as const)('%s, %d in %s: %s', (kind, ratio, unit, key) => {
    expect(explained(kind, ratio, unit)).toContain(key);
  });
});

test('values that agree to a per cent agree', () => {
  expect(explained('dcs', 1.008)).toEqual(['agree']);
  expect(explained('dcs', 0.992)).toEqual(['agree']);
});

describe('what no slip explains is said to be unexplained', () => {
  test.each([1.37, 3.1, 7.5, 0.6, 55])('%d', (ratio) => {
    expect(explained('total', ratio, 'barn')).toEqual(['unexplained']);
  });
  test('with the nearest as a doubt, within a tenth only', () => {
    const near = judgeMixUp(12.1, 1, usualSlips('dcs', 'barn', 1));
    expect(near).toMatchObject({ verdict: 'unexplained', nearest: { key: 'per steradian' } });
    expect(judgeMixUp(1.37, 1, usualSlips('total', 'barn', null))).toMatchObject({ nearest: null });
  });
});

describe('a slip that was computed', () => {
  test('counts like any other, best first', () => {
    const slips = [
      ...usualSlips('dcs', 'barn', 1),
      computedSlip('energy', 'took the energy for one per nucleon', 0.2484, 1),
      computedSlip('frame', 'is in the lab', 3.46, 1),
    ].filter((slip) => slip !== null);
    const judged = judgeMixUp(0.2484, 1, slips);
    expect(judged.verdict === 'explained' && judged.by.map(({ key }) => key)).toEqual([
      'energy',
      'exchange inverse',
    ]);
  });
  test('is left out where it has no value or changes nothing', () => {
    expect(computedSlip('a', '', NaN, 1)).toBeNull();
    expect(computedSlip('a', '', 0, 1)).toBeNull();
    const same = computedSlip('a', 'changes nothing', 1.01, 1);
    expect(judgeMixUp(1.02, 1, same ? [same] : [])).toMatchObject({
      verdict: 'unexplained',
      nearest: null,
    });
  });
});

test('in either direction a slip and its inverse are found', () => {
  for (const slip of usualSlips('dcs', 'barn', 1)) {
    const judged = judgeMixUp(slip.factor, 1, [slip]);
    expect(judged.verdict).toBe(Math.abs(slip.factor - 1) < 0.02 ? 'agree' : 'explained');
  }
});

test.each([
  [0, 1],
  [1, 0],
  [-1, 1],
  [NaN, 1],
  [1e308, 1e-308],
])('%d and %d are no pair to compare', (theirs, ours) => {
  expect(() => judgeMixUp(theirs, ours, [])).toThrow(RangeError);
});
