import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { PhaseShift } from '#shared/contracts/estimates.ts';
import {
  UNITARITY_CIRCLE,
  breaksUnitarity,
  groupsOf,
  lastShown,
  phaseSeries,
  transition,
  transitionSeries,
  waveRows,
} from '#src/features/case/validity/model/waves.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const wave = (l: number, delta: number, rest: Partial<PhaseShift> = {}): PhaseShift => ({
  l,
  delta,
  eta: 1,
  absoluteError: 1e-14,
  ...rest,
});

describe('T of a partial wave', () => {
  test('without absorption it is exp(iδ) sin δ, on the circle of radius ½ about i/2', () => {
    fc.assert(
      fc.property(fc.double({ min: -1.57, max: 1.57, noNaN: true }), (delta) => {
        const { re, im } = transition({ delta, eta: 1 });
        expect(Math.abs(re - Math.cos(delta) * Math.sin(delta))).toBeLessThan(1e-15);
        expect(Math.abs(im - Math.sin(delta) ** 2)).toBeLessThan(1e-15);
        expect(Math.abs(Math.hypot(re, im - 0.5) - 0.5)).toBeLessThan(1e-15);
      }),
    );
  });

  test('with absorption it lies inside by (1 - |S|)/2, and a black wave is its centre', () => {
    const { re, im } = transition({ delta: 0.7, eta: 0.3 });
    expectRelative(0.5 - Math.hypot(re, im - 0.5), 0.35, 1e-14);
    expect(transition({ delta: 1.1, eta: 0 })).toEqual({ re: 0, im: 0.5 });
  });

  test('the circle that is drawn is that one', () => {
    for (const [x, y] of UNITARITY_CIRCLE) {
      expectRelative(Math.hypot(x, (y ?? NaN) - 0.5), 0.5, 1e-14);
    }
  });
});

test('first order breaks unitarity where |T| is above one, whatever its sign, and nowhere unknown', () => {
  expect(breaksUnitarity(wave(0, 0.3, { born: 1.0001 }))).toBe(true);
  expect(breaksUnitarity(wave(0, 0.3, { born: -1.0001 }))).toBe(true);
  expect(breaksUnitarity(wave(0, 0.3, { born: 1 }))).toBe(false);
  expect(breaksUnitarity(wave(0, 0.3))).toBe(false);
});

test('a picture ends where no phase, first-order phase or loss can be told from nothing', () => {
  const waves = Array.from({ length: 40 }, (_, l) => wave(l, 0.8 * 0.5 ** l));
  // 0.5^l falls below 1e-3 at l = 10.
  expect(lastShown(waves)).toBe(9);
  const absorbed = waves.map((one) => (one.l === 20 ? { ...one, eta: 0.9 } : one));
  expect(lastShown(absorbed)).toBe(20);
  const born = waves.map((one) => (one.l === 30 ? { ...one, born: 0.1 } : one));
  expect(lastShown(born)).toBe(30);
  expect(lastShown(waves.slice(0, 3))).toBe(2);
  expect(lastShown([wave(0, 0)])).toBe(0);
});

describe('spin up and spin down', () => {
  const waves = [
    wave(0, 0.5, { j: 0.5, born: 0.4 }),
    wave(1, 0.3, { j: 1.5, born: 0.2 }),
    wave(1, 0.1, { j: 0.5, born: 0.2 }),
  ];
  test('are two curves, and first order, which knows no spin, is one', () => {
    expect(groupsOf(waves).map(({ waves: own }) => own.length)).toEqual([2, 1]);
    const [up, down, born] = phaseSeries(waves);
    expect(up?.points).toEqual([
      [0, 0.5],
      [1, 0.3],
    ]);
    expect(down?.points).toEqual([[1, 0.1]]);
    expect(born?.points).toEqual([
      [0, 0.4],
      [1, 0.2],
    ]);
  });

  test('first order stays on the real axis of T', () => {
    const born = transitionSeries(waves).find(({ key }) => key === 'born');
    expect(born?.points.every(([, im]) => im === 0)).toBe(true);
  });

  test('the file names l and j, gives rad and degrees, and every digit', () => {
    const [names, units, first] = waveRows(waves);
    expect(names?.slice(0, 4)).toEqual(['l', 'j', 'delta', 'delta']);
    expect(units?.slice(0, 4)).toEqual(['1', '1', 'rad', 'deg']);
    expect(Number(first?.[2])).toBe(0.5);
    expectRelative(Number(first?.[3]), 28.64788975654116, 1e-14);
    expect(names).toHaveLength(first?.length ?? 0);
  });
});
