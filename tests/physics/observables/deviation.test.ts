import { describe, expect, test } from 'vitest';
import type { Amplitude, ScatteringAmplitude } from '#server/physics/methods/amplitude.ts';
import { deviations } from '#server/physics/observables/deviation.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const K = 3;
const SCALES = { range: 1, edge: 0, terms: 1 };

function of(f: (q: number) => { re: number; im: number }, tail = 0): ScatteringAmplitude {
  const whole = (q: number): Amplitude => ({ ...f(q), error: 0 });
  return {
    amplitude: (q) => (tail !== 0 && q === 0 ? null : whole(q)),
    shortRange: whole,
    tail: { re: tail, im: 0 },
    floor: 0,
  };
}

const screened = (strength: number) => of((q) => ({ re: strength / (1 + q * q), im: 0 }));
const total = (value: number) => ({ value, error: 0 });
const pair = (first: ScatteringAmplitude, exact: ScatteringAmplitude, spin: number | null = null) =>
  deviations({
    born: first,
    exact,
    k: K,
    scales: SCALES,
    exchangeSpin: spin,
    elastic: { born: total(1), exact: total(1) },
  });

describe('first order against the exact curve', () => {
  test('the same curve deviates nowhere', () => {
    const found = pair(screened(1), screened(1));
    expect(found).toMatchObject({ largest: 0, weighted: 0, elastic: 0 });
  });

  test('an amplitude that is 10 % too large is 21 % too large in dσ/dΩ, at every angle above the thousandth of the forward one', () => {
    const { largest, weighted } = pair(screened(1.1), screened(1));
    expectRelative(largest, 0.21, 1e-12);
    // Below it the difference is measured by that thousandth: (1/4π)∫ min(1, 1000 s²) dΩ with s = 1/(1+q²), by hand in x = q².
    const all = 4 * K * K;
    const edge = Math.sqrt(1000) - 1;
    const beyond = 1000 * (1 / (1 + edge) - 1 / (1 + all));
    expect(edge).toBeLessThan(all);
    expectRelative(weighted, (0.21 * (edge + beyond)) / all, 2e-3);
  });

  test('a zero of the exact curve is no infinite deviation, and the place of the largest is told', () => {
    const zero = 2 * K * Math.sin(Math.PI / 6);
    const exact = of((q) => ({ re: (zero * zero - q * q) / (zero * zero), im: 0 }));
    const first = of((q) => ({ re: Math.max(0.2, (zero * zero - q * q) / (zero * zero)), im: 0 }));
    const { largest, largestAt } = pair(first, exact);
    // At the zero itself 0.2² stands against a thousandth of 1.
    expectRelative(largest, 40, 1e-6);
    expectRelative(largestAt, Math.PI / 3, 1e-3);
  });

  test('the sign of an amplitude changes nothing for distinct particles, nor its phase for identical ones alike', () => {
    expect(pair(screened(-1), screened(1))).toMatchObject({ largest: 0, weighted: 0 });
    const turned = of((q) => ({ re: 0, im: 1 / (1 + q * q) }));
    expect(pair(screened(1), turned, 0).largest).toBeLessThan(1e-14);
  });

  test('a Coulomb tail: nothing is measured by the forward direction, and the totals are left out', () => {
    const tail = (strength: number) => of((q) => ({ re: -strength / (q * q), im: 0 }), strength);
    const found = deviations({
      born: tail(1.1),
      exact: tail(1),
      k: K,
      scales: SCALES,
      exchangeSpin: null,
      elastic: { born: { divergent: 'yes' }, exact: { divergent: 'yes' } },
    });
    expect(found.elastic).toBeNull();
    expectRelative(found.largest, 0.21, 1e-12);
    expectRelative(found.weighted, 0.21, 1e-12);
  });

  test('totals that differ by 3 % deviate by 3 %, of the exact one', () => {
    const found = deviations({
      born: screened(1),
      exact: screened(1),
      k: K,
      scales: SCALES,
      exchangeSpin: null,
      elastic: { born: total(1.03), exact: total(1) },
    });
    expectRelative(found.elastic ?? 0, 0.03, 1e-12);
  });
});
