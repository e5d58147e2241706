import { describe, expect, test } from 'vitest';
import { firstBorn } from '#server/physics/methods/born1.ts';
import type { MethodAmplitude } from '#server/physics/methods/amplitude.ts';
import { gaussPanel } from '#server/physics/numerics/gauss-rule.ts';
import type { FormValues } from '#server/physics/potentials/types.ts';
import { build } from '#tests/physics/potentials/build-term.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { phaseGap, TWO_MU, wavesOf } from './waves-of.ts';

/** ∫ (|f|² + |g|²) dΩ by panels over the angle, no sum over waves. */
function overAngle({ amplitude, flip }: MethodAmplitude, k: number, panels = 24): number {
  const square = (theta: number) => {
    const q = 2 * k * Math.sin(theta / 2);
    const [f, g] = [amplitude(q), flip?.(q) ?? { re: 0, im: 0 }];
    if (!f) return NaN;
    return (f.re ** 2 + f.im ** 2 + g.re ** 2 + g.im ** 2) * Math.sin(theta);
  };
  let sum = 0;
  for (let i = 0; i < panels; i++) {
    sum += gaussPanel(square, (Math.PI * i) / panels, (Math.PI * (i + 1)) / panels, 16).value;
  }
  return 2 * Math.PI * sum;
}

const CASES: [string, FormValues, number][] = [
  ['woodsSaxon', { V0: -30, R: 3, a: 0.4 }, 4],
  ['woodsSaxon', { V0: -30, W0: -12, R: 3, a: 0.4 }, 4],
  ['gaussian', { V0: -50, W0: -400, a: 1 }, 2],
  ['squareWell', { V0: -60, W0: -1, R: 2 }, 1.5],
  ['yukawa', { V0: -20, a: 1 }, 3],
  ['yukawa', { V0: 100, a: 0.3 }, 0.2],
  ['exponential', { V0: -20, a: 0.5 }, 2],
  ['hulthen', { V0: -10, a: 0.7 }, 2],
  ['moliere', { Z: 6 }, 5],
  ['deltaShell', { g: -9, R: 2 }, 2],
  ['hardSphere', { R: 2 }, 3],
];

describe.each(CASES)('%s %j at k = %s', (form, values, k) => {
  const found = wavesOf([build(form, values)], k);

  test('the optical theorem, its elastic part integrated over angle', () => {
    const absorbed = 'value' in found.absorption ? found.absorption.value : NaN;
    const total = overAngle(found, k) + absorbed;
    expectRelative(((4 * Math.PI) / k) * (found.amplitude(0)?.im ?? NaN), total, 1e-10);
  });

  test('no wave comes out larger than it went in', () => {
    for (const { eta, error, l } of found.waves) {
      expect(eta, `l = ${l}`).toBeLessThanOrEqual(1 + 2 * error);
      expect(eta).toBeGreaterThanOrEqual(0);
    }
  });

  test('every amplitude is better known than 1e-11 of the forward one', () => {
    const forward = found.amplitude(0);
    const size = Math.hypot(forward?.re ?? NaN, forward?.im ?? NaN);
    for (const q of [0, 0.3, 1, 1.7, 2]) {
      expect(found.amplitude(q * k)?.error).toBeLessThan(1e-11 * size);
    }
  });
});

describe('limits and symmetries', () => {
  test('a potential far too weak for its square to be seen keeps the optical theorem', () => {
    const [k, V0] = [6, -1e-7];
    const found = wavesOf([build('gaussian', { V0, a: 2 })], k);
    const f = found.amplitude(0);
    expect(f?.im).toBeLessThan(1e-6 * (f?.re ?? NaN));
    expectRelative(((4 * Math.PI) / k) * (f?.im ?? NaN), overAngle(found, k), 1e-9);
  });

  test.each(['gaussian', 'exponential', 'yukawa', 'woodsSaxon'])(
    'a weak %s is first order, and differs from it by second order',
    (form) => {
      const at = (V0: number) => {
        const term = build(form, form === 'woodsSaxon' ? { V0, R: 2, a: 0.3 } : { V0, a: 0.8 });
        const first = firstBorn([term], TWO_MU);
        const found = wavesOf([term], 3);
        return [0, 1, 4].map((q) => {
          const [f, f1] = [found.amplitude(q), first.amplitude(q)];
          return Math.hypot((f?.re ?? NaN) - (f1?.re ?? NaN), f?.im ?? NaN);
        });
      };
      const [weak, weaker] = [at(1e-6), at(1e-9)];
      for (const [i, one] of weak.entries()) expectRelative((weaker[i] ?? NaN) / one, 1e-6, 2e-3);
    },
  );

  test('phases of a weak potential keep their digits', () => {
    const term = build('woodsSaxon', { V0: -1e-8, R: 3, a: 0.5 });
    const { waves } = wavesOf([term], 2);
    for (const { l, delta, born } of waves.slice(0, 8)) {
      expectRelative(delta, born ?? NaN, 1e-7 / (l + 1));
      expect(delta).not.toBe(0);
    }
  });

  test.each(['yukawa', 'gaussian'])('%s: lengths times ten, momenta over ten', (form) => {
    const [one, ten] = [
      wavesOf([build(form, { V0: -30, a: 0.7 })], 2.5),
      wavesOf([build(form, { V0: -0.3, a: 7 })], 0.25),
    ];
    for (const [i, wave] of one.waves.entries()) {
      if (i > 12) break;
      expect(phaseGap(wave.delta, ten.waves[i]?.delta ?? NaN)).toBeLessThan(1e-13);
    }
    for (const q of [0, 1, 4]) {
      const [f, g] = [one.amplitude(q), ten.amplitude(q / 10)];
      expectRelative((g?.re ?? NaN) / 10, f?.re ?? NaN, 1e-11);
      expectRelative((g?.im ?? NaN) / 10, f?.im ?? NaN, 1e-11);
    }
  });

  test('a term cut in two is the same interaction', () => {
    const whole = wavesOf([build('gaussian', { V0: -30, W0: -3, a: 1 })], 2);
    const parts = [-10, -20].map((V0) => build('gaussian', { V0, W0: V0 / 10, a: 1 }));
    const halves = wavesOf(parts, 2);
    for (const q of [0, 1, 3]) {
      expectRelative(halves.amplitude(q)?.re ?? NaN, whole.amplitude(q)?.re ?? NaN, 1e-11);
      expectRelative(halves.amplitude(q)?.im ?? NaN, whole.amplitude(q)?.im ?? NaN, 1e-11);
    }
  });

  test('a formula and a fine table give the phases of the form they copy', () => {
    const a = { value: 1, unit: 'angstrom' };
    const formula = build('expression', {
      formula: 'V0*exp(-(r/a)^2)',
      parameters: { V0: { value: -10, unit: 'eV' }, a },
    });
    const points = Array.from({ length: 261 }, (_, i) => {
      const r = i / 40;
      return [r, -10 * Math.exp(-r * r)] as const;
    });
    const table = build('tabulated', { points, tail: 'zero' });
    const [form, typed, read] = [build('gaussian', { V0: -10, a: 1 }), formula, table].map((term) =>
      wavesOf([term], 2),
    );
    for (let l = 0; l < 10; l++) {
      const phase = form?.waves[l]?.delta ?? NaN;
      expect(phaseGap(typed?.waves[l]?.delta ?? NaN, phase)).toBeLessThan(1e-13);
      // A cubic spline misses h⁴/384 of the fourth derivative.
      expect(phaseGap(read?.waves[l]?.delta ?? NaN, phase)).toBeLessThan(1e-6);
    }
  });

  test('a potential as 1/r^1.5 at the origin is followed there', () => {
    const a = { value: 1, unit: 'angstrom' };
    const steep = build('expression', {
      formula: 'V0*(a/r)^1.5*exp(-r/a)',
      parameters: { V0: { value: -10, unit: 'eV' }, a },
    });
    const found = wavesOf([steep], 2);
    expectRelative(2 * Math.PI * (found.amplitude(0)?.im ?? NaN), overAngle(found, 2), 1e-10);
  });

  test('a barrier too thick to see through is a hard sphere', () => {
    const k = 1.5;
    const hard = wavesOf([build('hardSphere', { R: 2 })], k);
    const thick = wavesOf([build('squareWell', { V0: 1e6, R: 2 })], k);
    // The wave enters by 1/sqrt(U) = 0.002.
    for (let l = 0; l < 6; l++) {
      const gap = phaseGap(thick.waves[l]?.delta ?? NaN, hard.waves[l]?.delta ?? NaN);
      expect(gap).toBeLessThan(0.004);
      expect(gap).toBeGreaterThan(1e-6);
    }
  });

  test('far waves are first order, and the table of waves goes on with them', () => {
    const { waves, lMax } = wavesOf([build('yukawa', { V0: -5, a: 1 })], 4);
    const last = waves.at(-1);
    expect(last?.l).toBeGreaterThan(lMax);
    expectRelative(last?.delta ?? NaN, last?.born ?? NaN, 1e-14);
    const before = waves[lMax];
    expectRelative(before?.delta ?? NaN, before?.born ?? NaN, 1e-6);
  });
});
