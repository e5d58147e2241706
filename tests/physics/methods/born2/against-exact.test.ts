import { describe, expect, test } from 'vitest';
import { secondBorn } from '#server/physics/methods/born2/second-born.ts';
import { eikonal } from '#server/physics/methods/eikonal/eikonal.ts';
import type { PartialWaves } from '#server/physics/methods/amplitude.ts';
import { partialWaves } from '#server/physics/methods/partial-waves/partial-waves.ts';
import type { Term } from '#server/physics/potentials/types.ts';
import { available, difference, form, inputOf, modulus, scaled } from './input.ts';

function exact(terms: readonly Term[], k: number): PartialWaves {
  const found = partialWaves({ ...inputOf(terms, k), projectileSpin: 0 });
  if ('unavailable' in found) throw new Error(found.unavailable);
  return found;
}

const TERMS: [string, Term][] = [
  ['yukawa', form('yukawa', { V0: 0.3, a: 1 })],
  ['gaussian with absorption', form('gaussian', { V0: -0.4, W0: -0.3, a: 1 })],
  ['woodsSaxon', form('woodsSaxon', { V0: -0.1, W0: -0.05, R: 2, a: 0.3 })],
  ['squareWell', form('squareWell', { V0: 0.3, W0: 0, R: 1.2 })],
  ['hulthen', form('hulthen', { V0: -0.2, a: 0.8 })],
];

describe.each(TERMS)('%s: second Born against partial waves', (_name, term) => {
  test.each([0.3, 2])('what is left is of third order at k = %f', (k) => {
    const left = (strength: number, q: number) => {
      const terms = [scaled(term, strength)];
      const f = available(secondBorn(inputOf(terms, k))).amplitude(q);
      return difference(exact(terms, k).amplitude(q), f);
    };
    for (const q of [0, 0.8 * k, 2 * k]) {
      const [one, two] = [left(0.25, q), left(0.5, q)];
      const [small, large] = [modulus(one), modulus(two)];
      // 8 times as much, and what fourth order adds.
      expect(large / small).toBeGreaterThan(6.5);
      expect(large / small).toBeLessThan(9.5);
      expect(small).toBeGreaterThan(1e3 * (one.error + 1e-14));
    }
  });

  test('absorption beyond second order is of third', () => {
    const left = (strength: number) => {
      const terms = [scaled(term, strength)];
      const [f, g] = [available(secondBorn(inputOf(terms, 2))), exact(terms, 2)];
      if ('divergent' in f.absorption || 'divergent' in g.absorption) throw new Error('finite');
      return Math.abs(f.absorption.value - g.absorption.value);
    };
    const [one, two] = [left(0.25), left(0.5)];
    if (term.strength.im === 0) expect(two).toBeLessThan(1e-9);
    else {
      expect(two / one).toBeGreaterThan(6.5);
      expect(two / one).toBeLessThan(9.5);
    }
  });
});

describe('the eikonal against partial waves', () => {
  test('comes nearer as the energy rises with the depth over the speed kept', () => {
    const off = (k: number) => {
      const terms = [form('gaussian', { V0: -1.2 * k, W0: -0.3 * k, a: 1 })];
      const [f, g] = [available(eikonal(inputOf(terms, k))), exact(terms, k)];
      const forward = modulus(g.shortRange(0));
      return [0, 1, 2].map((q) => modulus(difference(f.amplitude(q), g.amplitude(q))) / forward);
    };
    const [slow, fast] = [off(10), off(40)];
    // The first correction falls as 1/k, or 1/k² where it is out of phase.
    for (const [i, value] of slow.entries()) {
      expect(value).toBeLessThan(0.1);
      expect(fast[i]).toBeLessThan(value / 3);
      expect(fast[i]).toBeGreaterThan(value / 30);
    }
  });

  test('point charges and a nuclear well: near the exact amplitude at small angles', () => {
    const k = 30;
    const terms = [
      form('extendedCharge', { chargeProduct: 1, kind: 'uniformSphere', radius: 1 }),
      form('woodsSaxon', { V0: -30, W0: -30, R: 1, a: 0.1 }),
    ];
    const [f, g] = [available(eikonal(inputOf(terms, k))), exact(terms, k)];
    for (const theta of [0.02, 0.05, 0.1]) {
      const q = 2 * k * Math.sin(theta / 2);
      const [one, other] = [f.amplitude(q), g.amplitude(q)];
      expect(modulus(difference(one, other))).toBeLessThan(
        0.03 * modulus(other ?? { re: NaN, im: NaN }),
      );
    }
  });
});
