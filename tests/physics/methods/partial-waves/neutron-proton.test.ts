import { describe, expect, test } from 'vitest';
import { bracketedRoot } from '#server/physics/numerics/root.ts';
import { build } from '#tests/physics/potentials/build-term.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { TWO_MU, wavesOf } from './waves-of.ts';

/* Lengths in fm stand for those in angstrom: the radial equation knows no unit. */

/** hbar²/2mu of neutron and proton, MeV fm². */
const HBAR2_OVER_2MU = 41.47105958686056;

/** x = K R of the square well with scattering length a: tan x/x = 1 - a/R; above pi/2 where it binds. */
function depthFor(a: number, R: number): number {
  const f = (x: number) => (1 - a / R) * x * Math.cos(x) - Math.sin(x);
  return a > 0
    ? bracketedRoot(f, Math.PI / 2 + 1e-9, Math.PI - 1e-9).value
    : bracketedRoot(f, 1e-3, Math.PI / 2 - 1e-9).value;
}
function well(a: number, r: number) {
  const range = (R: number) => {
    const x = depthFor(a, R);
    return R * (1 - R / (x * x * a) - (R * R) / (3 * a * a)) - r;
  };
  const R = bracketedRoot(range, 1, 4).value;
  const x = depthFor(a, R);
  return build('squareWell', { V0: (-x * x) / (TWO_MU * R * R), R });
}

// Triplet and singlet lengths and ranges of neutron and proton: from memory, as printed in textbooks of nuclear physics.
const TRIPLET = { a: 5.424, r: 1.759 };
const SINGLET = { a: -23.749, r: 2.81 };

describe('neutrons on protons by two square wells', () => {
  const [triplet, singlet] = [well(TRIPLET.a, TRIPLET.r), well(SINGLET.a, SINGLET.r)];

  test('have the lengths and ranges they were made for; the triplet binds, the singlet does not', () => {
    for (const [term, { a, r }, bound] of [
      [triplet, TRIPLET, 1],
      [singlet, SINGLET, 0],
    ] as const) {
      const { scatteringLength, effectiveRange, boundStates } = wavesOf([term], 0.01).lowEnergy;
      expectRelative(scatteringLength?.value ?? NaN, a, 1e-9);
      expectRelative(effectiveRange?.value ?? NaN, r, 1e-9);
      expect(boundStates).toBe(bound);
    }
  });

  test('scatter 20.4918 barn as the energy goes to zero', () => {
    const k = 1e-5;
    const cross = [triplet, singlet].map((term) => {
      const delta = wavesOf([term], k).waves[0]?.delta ?? NaN;
      return (4 * Math.PI * Math.sin(delta) ** 2) / (k * k);
    });
    const [t = NaN, s = NaN] = cross;
    // 1 fm² is 0.01 barn.
    expectRelative((0.75 * t + 0.25 * s) / 100, 20.4918, 2e-6);
    // By hand: pi (3 a_t² + a_s²).
    expectRelative(0.75 * t + 0.25 * s, Math.PI * (3 * TRIPLET.a ** 2 + SINGLET.a ** 2), 1e-6);
  });

  test('the triplet length and range put the deuteron at 2.2225 MeV, and the well, which has a shape besides, within half a per cent of kappa', () => {
    const { scatteringLength, effectiveRange } = wavesOf([triplet], 0.01).lowEnergy;
    const [a, r] = [scatteringLength?.value ?? NaN, effectiveRange?.value ?? NaN];
    const kappa = (1 - Math.sqrt(1 - (2 * r) / a)) / r;
    expectRelative(HBAR2_OVER_2MU * kappa ** 2, 2.2225, 1e-4);
    // The binding of the well itself: K cot(K R) = -kappa.
    const depth = TWO_MU * -triplet.strength.re;
    const R = triplet.breakpoints[0] ?? NaN;
    const f = (q: number) => {
      const K = Math.sqrt(depth - q * q);
      return K * Math.cos(K * R) + q * Math.sin(K * R);
    };
    expectRelative(bracketedRoot(f, 0.1, 0.4).value, kappa, 5e-3);
  });
});
