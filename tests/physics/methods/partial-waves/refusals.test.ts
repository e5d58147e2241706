import { describe, expect, test } from 'vitest';
import type { Term } from '#server/physics/potentials/types.ts';
import { build, CONTEXT } from '#tests/physics/potentials/build-term.ts';
import { answerOf, TWO_MU } from './waves-of.ts';

function reasonOf(terms: readonly Term[], k: number, spin: number | null = 0.5): string {
  const found = answerOf(terms, k, TWO_MU, spin);
  return 'unavailable' in found ? found.unavailable : 'available';
}
const well = build('squareWell', { V0: -10, R: 1 });

describe('what partial waves cannot do is said', () => {
  test('a contact interaction is first order by definition', () => {
    const contact = build('contact', { b: 1e-5 });
    expect(reasonOf([contact], 1)).toMatch(/contact.*first order by definition.*born1/i);
    expect(reasonOf([well, contact], 1)).toMatch(/contact/);
  });

  test('a scattering factor is a potential as far as it is one sum of Gaussians', () => {
    const carbon = build('atomicElectron', { element: 'C' }, CONTEXT);
    expect(reasonOf([carbon], 13)).toMatch(/scattering factor.*q = 25\.13.*moliere/);
    expect(reasonOf([carbon], 5)).toBe('available');
  });

  test('a term that creates particles', () => {
    const creating = { ...well, strength: { re: -1, im: 0.1 } };
    expect(reasonOf([creating], 1)).toMatch(/would create particles.*W0 < 0/);
  });

  test('an interaction over too many wavelengths', () => {
    expect(reasonOf([build('gaussian', { V0: -1, a: 1e4 })], 1)).toMatch(
      /radians of the wave.*eikonal/,
    );
  });

  test('a resonance narrower than the last digit of the energy', () => {
    // A well behind a barrier: at the energy of its quasi-bound state the phase jumps by pi within some 1e-16 of the energy.
    const inner = build('squareWell', { V0: -40, R: 1 });
    const barrier = build('squareWell', { V0: 40 * 100, R: 1.6 });
    const opened = build('squareWell', { V0: -40 * 100, R: 1 });
    const kappa = (k: number) => Math.sqrt(TWO_MU * 4000 - k * k);
    const inside = (k: number) => Math.sqrt(k * k + TWO_MU * 40);
    // K cot K = -kappa at R = 1
    let [low, high] = [0.1, 4];
    const miss = (k: number) => inside(k) * Math.cos(inside(k)) + kappa(k) * Math.sin(inside(k));
    if (miss(low) * miss(high) > 0) [low, high] = [high, 6];
    for (let i = 0; i < 200; i++) {
      const middle = (low + high) / 2;
      if (miss(low) * miss(middle) <= 0) high = middle;
      else low = middle;
    }
    expect(reasonOf([inner, barrier, opened], low)).toMatch(/l = 0.*so narrow/);
    expect(reasonOf([inner, barrier, opened], low * 1.01)).toBe('available');
  });

  test('an imaginary Coulomb tail', () => {
    const charge = build('coulomb', { chargeProduct: 1 });
    expect(reasonOf([{ ...charge, strength: { re: 1, im: -1 } }], 1)).toMatch(/absorbs at any/);
  });

  test('a Coulomb tail beside a polarization tail, and a hopeless Sommerfeld parameter', () => {
    const charge = build('coulomb', { chargeProduct: 1 });
    const polarized = build('polarization', { alpha: 1, d: 1 });
    expect(reasonOf([charge, polarized], 1)).toMatch(/cut the weaker tail off/);
    const strong = build('coulomb', { chargeProduct: 1e5 });
    expect(reasonOf([strong], 1)).toMatch(/Sommerfeld's parameter.*Rutherford/);
  });

  test('a spin-orbit term without a spin of one half', () => {
    const term = build('spinOrbit', { Vso: 1, R: 1, a: 0.2 });
    expect(reasonOf([well, term], 1, 0)).toMatch(/spin 0; .*spin 1\/2/);
    expect(reasonOf([well, term], 1, null)).toMatch(/not known.*Give the spin/);
  });

  test('an imaginary spin-orbit term that creates more than W0 absorbs', () => {
    const term = build('spinOrbit', { Vso: 0, Wso: 1e11, R: 2, a: 0.3 });
    expect(reasonOf([well, term], 2)).toMatch(/\|S\| = \d.*Wso/);
  });
});
