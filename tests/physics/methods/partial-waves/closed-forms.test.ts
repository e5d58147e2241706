import { describe, expect, test } from 'vitest';
import { riccatiBessel } from '#server/physics/numerics/riccati-bessel.ts';
import { build } from '#tests/physics/potentials/build-term.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { elasticOf, phaseGap, TWO_MU, wavesOf } from './waves-of.ts';

/** F, G and their slopes for every l, from the recurrences alone. */
function functionsAt(x: number, l: number) {
  const [F, G] = [new Float64Array(l + 2), new Float64Array(l + 2)];
  riccatiBessel(x, F, G);
  const at = (row: Float64Array, i: number) => row[i] ?? NaN;
  const slope = (row: Float64Array) => ((l + 1) / x) * at(row, l) - at(row, l + 1);
  return { f: at(F, l), g: at(G, l), df: slope(F), dg: slope(G) };
}

/** tan δ of a wave with u'/u = q at R. */
function phaseFrom(q: number, k: number, R: number, l: number): number {
  const { f, g, df, dg } = functionsAt(k * R, l);
  return Math.atan((k * df - q * f) / (q * g - k * dg));
}

describe('square well and barrier', () => {
  const R = 1.3;
  test.each([
    [-3, 0.05],
    [-80, 0.4],
    [-40, 3],
    [30, 3.1],
    [-500, 12],
    [200, 15],
  ])('V0 = %s eV, k = %s: phases from the logarithmic derivative at the edge', (V0, k) => {
    const { waves } = wavesOf([build('squareWell', { V0, R })], k);
    const inside = Math.sqrt(k * k - TWO_MU * V0);
    expect(waves.length).toBeGreaterThan(k * R);
    for (const { l, delta, error } of waves) {
      if (l > inside * R + 4) break;
      const { f, df } = functionsAt(inside * R, l);
      const expected = phaseFrom((inside * df) / f, k, R, l);
      expect(phaseGap(delta, expected), `l = ${l}`).toBeLessThan(1e-12 + error);
    }
  });

  test('a barrier higher than the energy: the wave inside grows, it does not swing', () => {
    const [V0, k] = [200, 2];
    const { waves } = wavesOf([build('squareWell', { V0, R })], k);
    const kappa = Math.sqrt(TWO_MU * V0 - k * k);
    const s = waves[0]?.delta ?? NaN;
    const expected = phaseFrom(kappa / Math.tanh(kappa * R), k, R, 0);
    expect(phaseGap(s, expected)).toBeLessThan(1e-13);
  });
});

test('delta shell: tan δ = -U F²/(k + U F G)', () => {
  const [g, R, k] = [-12, 1.7, 2.3];
  const { waves } = wavesOf([build('deltaShell', { g, R })], k);
  for (const { l, delta } of waves.slice(0, 12)) {
    const { f, g: irregular } = functionsAt(k * R, l);
    const U = TWO_MU * g;
    const expected = Math.atan((-U * f * f) / (k + U * f * irregular));
    expect(phaseGap(delta, expected), `l = ${l}`).toBeLessThan(1e-13);
  }
});

describe('hard sphere', () => {
  // From Σ (2l+1) sin² δ_l with tan δ_l = j_l/y_l, in units of pi R².
  test.each([
    [0.1, 3.98681618],
    [1, 3.38243785],
    [5, 2.6023764],
    [10, 2.39722856],
    [50, 2.14296505],
  ])('kR = %s: σ = %s pi R²', (k, expected) => {
    const found = wavesOf([build('hardSphere', { R: 1 })], k);
    expectRelative(elasticOf(found, k) / Math.PI, expected, 3e-9);
    const forward = found.amplitude(0);
    expectRelative(((4 * Math.PI) / k) * (forward?.im ?? NaN), elasticOf(found, k), 1e-12);
  });

  test.each([1e-3, 0.7, 8, 50])('kR = %s: tan δ_l = -F/G', (k) => {
    const { waves } = wavesOf([build('hardSphere', { R: 1 })], k);
    for (const { l, delta } of waves) {
      const { f, g } = functionsAt(k, l);
      expect(phaseGap(delta, Math.atan(-f / g)), `l = ${l}`).toBeLessThan(2e-13);
    }
  });

  test('four times pi R² as the energy goes to zero, with its next order', () => {
    const k = 1e-3;
    const found = wavesOf([build('hardSphere', { R: 1 })], k);
    expectRelative(elasticOf(found, k), 4 * Math.PI * (1 - (k * k) / 3), 1e-11);
    expectRelative(found.amplitude(0)?.re ?? NaN, -1, 1e-6);
  });

  test('what lies inside it is not felt', () => {
    const sphere = build('hardSphere', { R: 1 });
    const inside = build('squareWell', { V0: -70, R: 0.9 });
    const [bare, filled] = [wavesOf([sphere], 3), wavesOf([sphere, inside], 3)];
    for (const [i, wave] of bare.waves.entries()) {
      if (i > 8) break;
      expect(phaseGap(wave.delta, filled.waves[i]?.delta ?? NaN)).toBeLessThan(1e-13);
    }
    for (const q of [0, 1, 5]) {
      expectRelative(filled.amplitude(q)?.im ?? NaN, bare.amplitude(q)?.im ?? NaN, 1e-11);
    }
  });
});
