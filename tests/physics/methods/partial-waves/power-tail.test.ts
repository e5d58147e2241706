import { describe, expect, test } from 'vitest';
import { gaussPanel } from '#server/physics/numerics/gauss-rule.ts';
import { build } from '#tests/physics/potentials/build-term.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { elasticOf, phaseGap, wavesOf } from './waves-of.ts';

const K = 1.2;
const polarized = (alpha: number) => build('polarization', { alpha, d: 0.9 });
const formula = (text: string, V0: number) =>
  build('expression', {
    formula: text,
    parameters: { V0: { value: V0, unit: 'eV' }, a: { value: 0.9, unit: 'angstrom' } },
  });

describe('a tail that falls as a power of r', () => {
  const found = wavesOf([polarized(3)], K);

  test('the optical theorem, elastic scattering integrated over angle', () => {
    const square = (theta: number) => {
      const f = found.amplitude(2 * K * Math.sin(theta / 2));
      return ((f?.re ?? NaN) ** 2 + (f?.im ?? NaN) ** 2) * Math.sin(theta);
    };
    // The amplitude has a cusp straight forwards: panels that double in width.
    let sum = 0;
    for (let edge = Math.PI; edge > 1e-9; edge /= 2)
      sum += gaussPanel(square, edge / 2, edge, 16).value;
    const total = 2 * Math.PI * sum;
    expectRelative(((4 * Math.PI) / K) * (found.amplitude(0)?.im ?? NaN), total, 1e-9);
    expectRelative(elasticOf(found, K), total, 1e-9);
  });

  test('far waves have the phase that first order gives U = -B/r⁴, pi k² B/((2l-1)(2l+1)(2l+3))', () => {
    const B = -0.25 * polarized(3).strength.re;
    for (const l of [60, 150]) {
      const exact = (Math.PI * K * K * B) / ((2 * l - 1) * (2 * l + 1) * (2 * l + 3));
      // The cut-off takes (kd/l)² of it.
      expectRelative(found.waves[l]?.delta ?? NaN, exact, 4 * ((K * 0.9) / l) ** 2);
    }
  });

  test('every real wave is unitary, and its error small', () => {
    for (const { eta, error } of found.waves) {
      expect(eta).toBe(1);
      expect(error).toBeLessThan(1e-12);
    }
    expect(found.amplitude(0)?.error).toBeLessThan(1e-10 * (found.amplitude(0)?.re ?? NaN));
  });

  test('a formula with the same tail gives the same waves', () => {
    const { strength } = polarized(3);
    const typed = wavesOf([formula('V0/(1 + (r/a)^2)^2', strength.re / 0.9 ** 4)], K);
    for (let l = 0; l < 40; l++) {
      expect(phaseGap(typed.waves[l]?.delta ?? NaN, found.waves[l]?.delta ?? NaN)).toBeLessThan(
        1e-13,
      );
    }
    for (const q of [0, 0.4, 2.4]) {
      expectRelative(typed.amplitude(q)?.re ?? NaN, found.amplitude(q)?.re ?? NaN, 1e-10);
      expectRelative(typed.amplitude(q)?.im ?? NaN, found.amplitude(q)?.im ?? NaN, 1e-9);
    }
  });

  test('beside a well that absorbs: a weak tail adds its first order to the waves', () => {
    const well = build('gaussian', { V0: -30, W0: -5, a: 1 });
    const bare = wavesOf([well], K);
    const at = (alpha: number) => {
      const both = wavesOf([well, polarized(alpha)], K);
      return (both.waves[2]?.delta ?? NaN) - (bare.waves[2]?.delta ?? NaN);
    };
    expectRelative(at(1e-4) / at(1e-5), 10, 1e-3);
    const { absorption } = wavesOf([well, polarized(1)], K);
    expect('value' in absorption ? absorption.value : NaN).toBeGreaterThan(0);
  });

  test('r^-6 typed as a formula, with its scattering length', () => {
    const { waves, lowEnergy } = wavesOf([formula('V0/(1 + (r/a)^6)', -20)], 0.01);
    const a = lowEnergy.scatteringLength?.value ?? NaN;
    expectRelative(Math.tan(waves[0]?.delta ?? NaN) / 0.01, -a, 1e-3);
    expect(lowEnergy.effectiveRange).toBeNull();
    expect(lowEnergy.remark).toMatch(/r\^-6/);
  });
});
