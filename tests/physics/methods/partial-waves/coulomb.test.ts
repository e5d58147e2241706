import { describe, expect, test } from 'vitest';
import { build } from '#tests/physics/potentials/build-term.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { phaseGap, TWO_MU, wavesOf } from './waves-of.ts';

const E2 = 14.39964546860267;
const charge = (eta: number, k: number) =>
  build('coulomb', { chargeProduct: (2 * eta * k) / (TWO_MU * E2) });
const sphere = (eta: number, k: number, radius: number) =>
  build('extendedCharge', {
    kind: 'uniformSphere',
    radius,
    chargeProduct: (2 * eta * k) / (TWO_MU * E2),
  });
const size = (f: { re: number; im: number } | null) => Math.hypot(f?.re ?? NaN, f?.im ?? NaN);

describe('a point charge alone', () => {
  test.each([0.3, -2, 12])(
    'eta = %s: Rutherford, with the phase eta ln t² turns the amplitude by',
    (eta) => {
      const k = 1.5;
      const found = wavesOf([charge(eta, k)], k);
      expect(found.waves).toEqual([]);
      expect(found.amplitude(0)).toBeNull();
      for (const t of [0.01, 0.3, 1]) {
        expectRelative(size(found.amplitude(2 * k * t)), Math.abs(eta) / (2 * k * t * t), 1e-14);
      }
      const [one, other] = [found.amplitude(2 * k), found.amplitude(k)];
      const turn =
        Math.atan2(other?.im ?? NaN, other?.re ?? NaN) - Math.atan2(one?.im ?? NaN, one?.re ?? NaN);
      expect(phaseGap(turn, 2 * eta * Math.LN2)).toBeLessThan(1e-13);
    },
  );
});

describe('a charge beside a short-range potential', () => {
  const nuclear = build('woodsSaxon', { V0: -30, W0: -4, R: 2, a: 0.3 });

  test('the weakest charge leaves the neutral waves', () => {
    const k = 2;
    const [neutral, charged] = [wavesOf([nuclear], k), wavesOf([nuclear, charge(1e-13, k)], k)];
    for (let l = 0; l < 10; l++) {
      const [a, b] = [neutral.waves[l], charged.waves[l]];
      expect(phaseGap(a?.delta ?? NaN, b?.delta ?? NaN)).toBeLessThan(2e-12);
      expectRelative(b?.eta ?? NaN, a?.eta ?? NaN, 1e-11);
    }
    for (const q of [0, 1, 3]) {
      const [f, g] = [neutral.amplitude(q), charged.shortRange(q)];
      expect(Math.hypot((f?.re ?? NaN) - g.re, (f?.im ?? NaN) - g.im)).toBeLessThan(
        1e-10 * size(neutral.amplitude(0)),
      );
    }
    expectRelative(
      'value' in charged.absorption ? charged.absorption.value : NaN,
      'value' in neutral.absorption ? neutral.absorption.value : NaN,
      1e-11,
    );
  });

  test.each([2, -2])('eta = %s: spreading the charge weakens it', (eta) => {
    const k = 2;
    const { waves } = wavesOf([sphere(eta, k, 1.5)], k);
    // Relative to the point charge the sphere attracts where that repels; the phases are small at l = 4.
    expect(Math.sign(waves[4]?.delta ?? NaN)).toBe(Math.sign(eta));
    const small = wavesOf([sphere(eta, k, 0.01)], k);
    // First order: δ_0 = eta k² R²/5 C², C² = 2 pi eta/(exp(2 pi eta) - 1)
    const C = (2 * Math.PI * eta) / Math.expm1(2 * Math.PI * eta);
    expectRelative(small.waves[0]?.delta ?? NaN, (C * eta * (k * 0.01) ** 2) / 5, 0.06);
  });

  test('a charge that repels keeps slow particles from the nucleus', () => {
    const [slow, fast] = [0.3, 1.2].map((k) => wavesOf([nuclear, charge(1.5 / k, k)], k));
    const felt = (found: typeof slow) => 1 - (found?.waves[0]?.eta ?? NaN);
    expect(felt(slow)).toBeLessThan(1e-3);
    expect(felt(fast)).toBeGreaterThan(0.1);
  });

  test('opposite charges leave a neutral whole, which has a forward amplitude', () => {
    const k = 2;
    const found = wavesOf([sphere(1, k, 1), charge(-1, k)], k);
    expect(found.tail.re).toBe(0);
    const sum = found.waves.reduce(
      (total, { l, delta }) => total + (2 * l + 1) * Math.sin(delta) ** 2,
      0,
    );
    expectRelative((found.amplitude(0)?.im ?? NaN) * k, sum, 1e-12);
  });

  test('weak and strong ways meet: a nuclear part in two halves is what it was in one', () => {
    const k = 2;
    for (const V0 of [-0.35, -0.02]) {
      const whole = wavesOf([charge(1, k), build('gaussian', { V0, a: 1 })], k);
      // The same with a nuclear part a hundred million times weaker, to first order the same share.
      const share = wavesOf([charge(1, k), build('gaussian', { V0: V0 * 1e-8, a: 1 })], k);
      const ratio = (whole.waves[1]?.delta ?? NaN) / (share.waves[1]?.delta ?? NaN);
      expectRelative(ratio, 1e8, 0.5 * Math.abs(V0));
    }
  });
});
