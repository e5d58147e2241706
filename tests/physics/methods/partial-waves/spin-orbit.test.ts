import { describe, expect, test } from 'vitest';
import type { PartialWaves } from '#server/physics/methods/amplitude.ts';
import { build } from '#tests/physics/potentials/build-term.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { phaseGap, wavesOf } from './waves-of.ts';

const WELL = build('woodsSaxon', { V0: -40, R: 2, a: 0.3 });
const ABSORBING = build('woodsSaxon', { V0: -40, W0: -6, R: 2, a: 0.3 });
// 2 fm² in front of it: lengths here are angstrom.
const spin = (Vso: number) => build('spinOrbit', { Vso: Vso / 2e-10, R: 2, a: 0.3 });
const K = 2;

const at = (found: PartialWaves, theta: number) => {
  const q = 2 * K * Math.sin(theta / 2);
  const [f, g] = [found.amplitude(q), found.flip?.(q)];
  if (!f || !g) throw new Error('no amplitude');
  return { f, g };
};

/** P_l and its derivative at x, by their own recurrences. */
function legendre(l: number, x: number): [number, number] {
  let [p, before, d, dBefore] = [1, 0, 0, 0];
  for (let n = 0; n < l; n++) {
    [p, before] = [((2 * n + 1) * x * p - n * before) / (n + 1), p];
    [d, dBefore] = [dBefore + (2 * n + 1) * before, d];
  }
  return [p, d];
}

describe('spin-orbit term', () => {
  const found = wavesOf([ABSORBING, spin(3)], K);

  test('a wave for each j; one alone for l = 0', () => {
    expect(found.waves.slice(0, 5).map(({ l, j }) => [l, j])).toEqual([
      [0, 0.5],
      [1, 1.5],
      [1, 0.5],
      [2, 2.5],
      [2, 1.5],
    ]);
  });

  test('without strength it splits nothing and flips nothing', () => {
    const [bare, zero] = [wavesOf([WELL], K), wavesOf([WELL, spin(1e-30)], K)];
    for (const { l, delta } of zero.waves.slice(0, 9)) {
      expect(phaseGap(delta, bare.waves[l]?.delta ?? NaN)).toBeLessThan(1e-13);
    }
    const [one, other] = [bare.amplitude(1), zero.amplitude(1)];
    expectRelative(other?.re ?? NaN, one?.re ?? NaN, 1e-11);
    expect(Math.abs(zero.flip?.(1).re ?? NaN)).toBeLessThan(1e-11 * Math.abs(one?.re ?? NaN));
  });

  test('a positive strength attracts where l and sigma are parallel', () => {
    const { waves } = wavesOf([WELL, spin(0.05)], K);
    const bare = wavesOf([WELL], K);
    for (const { l, j, delta } of waves.slice(1, 9)) {
      const plain = bare.waves[l]?.delta ?? NaN;
      const shift = Math.sin(2 * (delta - plain));
      expect(Math.sign(shift), `l = ${l}, j = ${j}`).toBe((j ?? 0) > l ? 1 : -1);
    }
  });

  test('first order in its strength: the shifts of both waves are as l to -(l+1)', () => {
    const { waves } = wavesOf([WELL, spin(1e-5)], K);
    const bare = wavesOf([WELL], K);
    for (const l of [1, 2, 3, 4]) {
      const plain = bare.waves[l]?.delta ?? NaN;
      const [up, down] = waves.filter((wave) => wave.l === l).map(({ delta }) => delta - plain);
      expectRelative((up ?? NaN) / (down ?? NaN), -l / (l + 1), 1e-3);
    }
  });

  test('amplitudes from the table of waves, summed as textbooks print them', () => {
    for (const theta of [0.3, 1.2, 2.6]) {
      const x = Math.cos(theta);
      const sum = { fRe: 0, fIm: 0, gRe: 0, gIm: 0 };
      for (const { l, j, delta, eta } of found.waves) {
        const [p, d] = legendre(l, x);
        const [tRe, tIm] = [(eta * Math.sin(2 * delta)) / 2, (1 - eta * Math.cos(2 * delta)) / 2];
        const isUp = (j ?? 0) > l;
        const direct = ((isUp ? l + 1 : l) * p) / K;
        const turn = ((isUp ? 1 : -1) * Math.sin(theta) * d) / K;
        sum.fRe += direct * tRe;
        sum.fIm += direct * tIm;
        sum.gRe += turn * tRe;
        sum.gIm += turn * tIm;
      }
      const { f, g } = at(found, theta);
      expectRelative(f.re, sum.fRe, 1e-9);
      expectRelative(f.im, sum.fIm, 1e-9);
      expectRelative(g.re, sum.gRe, 1e-9);
      expectRelative(g.im, sum.gIm, 1e-9);
    }
  });

  test('nothing flips straight forwards or backwards', () => {
    expect(found.flip?.(0)).toMatchObject({ re: 0, im: 0 });
    expect(Math.hypot(found.flip?.(2 * K).re ?? NaN, found.flip?.(2 * K).im ?? NaN)).toBe(0);
  });

  test('the optical theorem holds with both amplitudes', () => {
    const steps = 400;
    let sum = 0;
    for (let i = 0; i < steps; i++) {
      // Midpoints of a periodic even function converge exponentially.
      const theta = ((i + 0.5) * Math.PI) / steps;
      const { f, g } = at(found, theta);
      const x = Math.cos(theta);
      sum += (f.re ** 2 + f.im ** 2 + g.re ** 2 + g.im ** 2) * fejer(steps, i) + 0 * x;
    }
    const absorbed = 'value' in found.absorption ? found.absorption.value : NaN;
    const total = 2 * Math.PI * sum + absorbed;
    expectRelative(((4 * Math.PI) / K) * (found.amplitude(0)?.im ?? NaN), total, 1e-10);
  });

  test('amplitudes and the sign of the analysing power by Clebsch-Gordan coefficients', () => {
    for (const theta of [0.4, 0.9, 2.2]) {
      const { f, g } = at(found, theta);
      const bySpin = coupled(found, theta);
      expectRelative(bySpin.kept.re, f.re, 1e-9);
      expectRelative(bySpin.kept.im, f.im, 1e-9);
      // Polarised along y = k_in × k_out: states (1, ±i)/√2, so that the flip adds to or takes from what is kept.
      const { kept, raised } = bySpin;
      const [up, down] = [1, -1].map((sign) => {
        // <(1, i)| M |(1, i)>/2 = kept + i raised for the upper sign; the other component follows by symmetry.
        const re = kept.re - sign * raised.im;
        const im = kept.im + sign * raised.re;
        return re * re + im * im;
      });
      const asymmetry = ((up ?? NaN) - (down ?? NaN)) / ((up ?? NaN) + (down ?? NaN));
      const formula =
        (2 * (f.im * g.re - f.re * g.im)) / (f.re ** 2 + f.im ** 2 + g.re ** 2 + g.im ** 2);
      expectRelative(asymmetry, formula, 1e-8);
      expect(Math.abs(formula)).toBeGreaterThan(1e-3);
    }
  });
});

/** Weight of midpoint i of n over theta for ∫ F(cos theta) d cos theta. Source: L. Fejér, Math. Z. 37 (1933) 287. */
function fejer(n: number, i: number): number {
  const theta = ((i + 0.5) * Math.PI) / n;
  let sum = 1;
  for (let j = 1; j <= n / 2; j++) sum -= (2 * Math.cos(2 * j * theta)) / (4 * j * j - 1);
  return (2 / n) * sum;
}

/**
 * f_{++} and f_{+-} (from spin down to up) in the plane of x and z, beam along z: (4 pi/k) Σ T <l 0 ½ m|j m> <l m-m' ½ m'|j m>
 * sqrt((2l+1)/4 pi) Y_{l,m-m'}(theta, 0), with the phases of Condon and Shortley.
 */
function coupled({ waves }: PartialWaves, theta: number) {
  const kept = { re: 0, im: 0 };
  const raised = { re: 0, im: 0 };
  for (const { l, j, delta, eta } of waves) {
    const [p, d] = legendre(l, Math.cos(theta));
    const [tRe, tIm] = [(eta * Math.sin(2 * delta)) / 2, (1 - eta * Math.cos(2 * delta)) / 2];
    const isUp = (j ?? 0) > l;
    const n = 2 * l + 1;
    // <l 0 ½ ½|j ½>², and <l 0 ½ -½|j -½> <l -1 ½ ½|j -½>
    const straight = (isUp ? l + 1 : l) / n;
    const turned = (isUp ? 1 : -1) * (Math.sqrt(l * (l + 1)) / n);
    const root = Math.sqrt(n / (4 * Math.PI));
    const [Y0, Yminus] = [
      root * p,
      l === 0 ? 0 : (root * Math.sin(theta) * d) / Math.sqrt(l * (l + 1)),
    ];
    const factor = ((4 * Math.PI) / K) * root;
    kept.re += factor * straight * Y0 * tRe;
    kept.im += factor * straight * Y0 * tIm;
    raised.re += factor * turned * Yminus * tRe;
    raised.im += factor * turned * Yminus * tIm;
  }
  return { kept, raised };
}
