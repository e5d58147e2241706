import { describe, expect, test } from 'vitest';
import {
  closedSecondAmplitude,
  numericalSecondAmplitude,
} from '#server/physics/methods/born2/second-amplitude.ts';
import { radialMesh } from '#server/physics/methods/born2/radial-mesh.ts';
import { secondOrderWaves } from '#server/physics/methods/born2/second-order-waves.ts';
import { waveSum } from '#server/physics/methods/born2/wave-sum.ts';
import { yukawaPair } from '#server/physics/methods/born2/yukawa-pairs.ts';
import { localPotential } from '#server/physics/methods/local-potential.ts';
import { sphericalBesselArray } from '#server/physics/numerics/spherical-bessel.ts';
import type { Term } from '#server/physics/potentials/types.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { FACTOR, form, inputOf, modulus } from './input.ts';

describe('sums of Yukawa potentials: closed form and partial waves', () => {
  const sums: [string, Term[]][] = [
    ['one', [form('yukawa', { V0: -3, a: 1 })]],
    ['two of opposite sign', [form('yukawa', { V0: -3, a: 1 }), form('yukawa', { V0: 8, a: 0.3 })]],
    ['screened charges', [form('screenedCoulomb', { a: 0.4 })]],
    ['moliere', [form('moliere', { Z: 20 })]],
    ['krc', [form('krc', { Z1: 2, Z2: 20 })]],
    ['universalIon', [form('universalIon', { Z1: 2, Z2: 20 })]],
  ];
  test.each(sums)('%s', (_name, terms) => {
    for (const k of [0.05, 1, 7]) {
      const input = inputOf(terms, k);
      const closed = closedSecondAmplitude(input);
      const waves = numericalSecondAmplitude(input);
      if (closed === null || 'unavailable' in waves) throw new Error('both routes are needed');
      const forward = modulus(closed.at(0));
      for (const share of [0, 1e-3, 0.2, 0.7, 0.9, 1]) {
        const [f, g] = [closed.at(2 * k * share), waves.at(2 * k * share)];
        const deviation = Math.hypot(f.re - g.re, f.im - g.im);
        expect(deviation).toBeLessThanOrEqual(f.error + g.error);
        expect(f.error + g.error).toBeLessThan(1e-11 * forward);
      }
      expect(closed.absorption).toEqual(waves.absorption);
    }
  });

  test('other forms, and sums with other forms, have no closed form', () => {
    const gaussian = form('gaussian', { V0: 1, W0: 0, a: 1 });
    expect(closedSecondAmplitude(inputOf([gaussian], 1))).toBeNull();
    const mixed = [gaussian, form('yukawa', { V0: 1, a: 1 })];
    expect(closedSecondAmplitude(inputOf(mixed, 1))).toBeNull();
  });
});

describe('the integral of two Yukawa potentials', () => {
  test('equal ranges: the formula of Dalitz', () => {
    const [mu, k] = [0.8, 1.7];
    for (const q of [0.01, 1, 3.4]) {
      const A = Math.sqrt(mu ** 4 + 4 * k * k * mu * mu + k * k * q * q);
      const { re, im } = yukawaPair(mu, mu, k, q);
      const factor = (2 * Math.PI ** 2) / (q * A);
      expectRelative(re, factor * Math.atan((mu * q) / (2 * A)), 1e-14);
      expectRelative(im, (factor / 2) * Math.log((A + k * q) / (A - k * q)), 1e-12);
    }
  });

  test('forward: π²/(mu² (mu ∓ 2ik)) for equal ranges', () => {
    const [mu, k] = [0.8, 1.7];
    const size = mu * mu + 4 * k * k;
    const { re, im } = yukawaPair(mu, mu, k, 0);
    expectRelative(re, Math.PI ** 2 / (mu * size), 1e-15);
    expectRelative(im, (2 * Math.PI ** 2 * k) / (mu * mu * size), 1e-15);
  });

  test('does not care which is which, and goes over into equal ranges', () => {
    expect(yukawaPair(0.3, 2, 1, 1.1)).toEqual(yukawaPair(2, 0.3, 1, 1.1));
    const [near, equal] = [yukawaPair(1, 1 + 1e-9, 1, 0), yukawaPair(1, 1, 1, 0)];
    expectRelative(near.re, equal.re, 1e-8);
    expectRelative(near.im, equal.im, 1e-8);
  });
});

/** x j_l and -x y_l and their derivatives with respect to x. */
function riccati(l: number, x: number) {
  const j = sphericalBesselArray(l + 1, x);
  const y = [-Math.cos(x) / x, -Math.cos(x) / x ** 2 - Math.sin(x) / x];
  for (let n = 1; n <= l; n++) y.push(((2 * n + 1) / x) * (y[n] ?? 0) - (y[n - 1] ?? 0));
  const pair = (one: number, next: number) => [x * one, (l + 1) * one - x * next] as const;
  const [F, dF] = pair(j[l] ?? NaN, j[l + 1] ?? NaN);
  const [G, dG] = pair(-(y[l] ?? NaN), -(y[l + 1] ?? NaN));
  return { F, dF, G, dG };
}

/** T_l of a square well by matching at R: exact in U. */
function wellWave(l: number, k: number, R: number, U: number) {
  const inside = Math.sqrt(k * k - U);
  const { F: f, dF: df } = riccati(l, inside * R);
  const { F, dF, G, dG } = riccati(l, k * R);
  const slope = (inside * df) / f / k;
  const tangent = (slope * F - dF) / (dG - slope * G);
  // T = tan δ/(1 - i tan δ)
  const size = 1 + tangent * tangent;
  return { re: tangent / size, im: (tangent * tangent) / size };
}

describe('single waves', () => {
  const [k, R] = [1.7, 1.3];
  const meshOf = (V0: number) => {
    const potential = localPotential([form('squareWell', { V0, W0: 0, R })], FACTOR);
    return radialMesh(potential, potential.edges, 3 / k);
  };

  test('square well: the terms of first and second order of the exact wave', () => {
    const waves = secondOrderWaves(meshOf(1), k, 6);
    for (let l = 0; l <= 5; l++) {
      const step = 0.02;
      const at = (factor: number) => wellWave(l, k, R, factor * step * FACTOR);
      const [p, m, p2, m2] = [at(1), at(-1), at(2), at(-2)];
      // Differences to the fourth order in the step.
      const second = (part: 're' | 'im') =>
        (16 * (p[part] + m[part]) - p2[part] - m2[part]) / (24 * step * step);
      const first = (8 * (p.re - m.re) - p2.re + m2.re) / (12 * step);
      expectRelative(waves.firstRe[l] ?? NaN, first, 1e-6);
      expectRelative(waves.secondIm[l] ?? NaN, second('im'), 1e-5);
      const size = Math.abs(waves.secondRe[l] ?? NaN) + (waves.secondIm[l] ?? NaN);
      expect(Math.abs((waves.secondRe[l] ?? NaN) - second('re'))).toBeLessThan(1e-5 * size);
    }
  });

  test('a finer mesh changes nothing beyond the bound of rounding', () => {
    const potential = localPotential([form('woodsSaxon', { V0: 2, W0: -1, R, a: 0.2 })], FACTOR);
    const edges = Array.from({ length: 61 }, (_, i) => (i * (R + 0.2 * 40)) / 60);
    const [coarse, fine] = [3, 1].map((width) =>
      secondOrderWaves(radialMesh(potential, edges, width / k), k, 12),
    );
    if (!coarse || !fine) throw new Error('two meshes are needed');
    for (let l = 0; l <= 12; l++) {
      const bound = (coarse.rounding[l] ?? NaN) + (fine.rounding[l] ?? NaN);
      expect(Math.abs((coarse.secondRe[l] ?? NaN) - (fine.secondRe[l] ?? NaN))).toBeLessThan(bound);
      expect(Math.abs((coarse.secondIm[l] ?? NaN) - (fine.secondIm[l] ?? NaN))).toBeLessThan(bound);
    }
  });
});

describe('sum over waves', () => {
  // Σ (2l+1) t^l P_l(x) = (1 - t²)/(1 - 2xt + t²)^{3/2}
  const t = 0.7;
  const waves = (count: number) => ({
    re: Float64Array.from({ length: count }, (_, l) => t ** l),
    im: Float64Array.from({ length: count }, (_, l) => -2 * t ** l),
    error: new Float64Array(count),
  });
  const k = 1.5;
  const exact = (q: number) => {
    const gap = (q * q) / (2 * k * k);
    return (1 - t * t) / ((1 - t) ** 2 + 2 * gap * t) ** 1.5 / k;
  };

  test.each([20, 60, 120])('%i waves: the error holds what is cut off', (count) => {
    const sum = waveSum(waves(count), k);
    for (const q of [0, 1e-3, 1, 2, 2.9, 3]) {
      const { re, im, error } = sum.at(q);
      expect(Math.abs(re - exact(q))).toBeLessThanOrEqual(error);
      expect(Math.abs(im + 2 * exact(q))).toBeLessThanOrEqual(2 * error);
      expect(error).toBeLessThanOrEqual(sum.largestError);
    }
    expect(sum.largestError).toBeLessThan(count === 120 ? 1e-11 : 10);
  });

  test('waves that do not die away have no bound', () => {
    const flat = new Float64Array(30).fill(1);
    const sum = waveSum({ re: flat, im: flat, error: new Float64Array(30) }, k);
    expect(sum.largestError).toBe(Infinity);
  });

  test('a blur of q adds the slope', () => {
    const sum = waveSum(waves(120), k);
    const [sharp, blurred] = [sum.at(1).error, sum.at(1, 1e-6).error];
    const slope = (exact(1 + 1e-6) - exact(1 - 1e-6)) / 2e-6;
    expect(blurred - sharp).toBeGreaterThan(1e-6 * Math.hypot(1, 2) * Math.abs(slope));
  });
});
