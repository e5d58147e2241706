import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { firstBorn } from '#server/physics/methods/born1.ts';
import { partialWaves } from '#server/physics/methods/partial-waves/partial-waves.ts';
import { sampleCone } from '#server/physics/observables/cone-samples.ts';
import type { Term } from '#server/physics/potentials/types.ts';
import { build } from '#tests/physics/potentials/build-term.ts';

const TWO_MU = 0.25;
const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });
/** Logarithms, so that small and large ones are met alike. */
const scaled = (low: number, high: number) => between(low, high).map((power) => 10 ** power);

const sign = fc.constantFrom(-1, 1);
const well = fc
  .record({
    V: scaled(-3, 2.5),
    sign,
    W: fc.option(scaled(-3, 2)),
    R: between(0.3, 4),
    a: between(0.1, 0.9),
  })
  .map(({ V, sign: s, W, R, a }) =>
    build('woodsSaxon', { V0: s * V, R, a, ...(W === null ? {} : { W0: -W }) }),
  );
const bell = fc
  .record({ V: scaled(-3, 2.5), sign, W: fc.option(scaled(-3, 2)), a: between(0.2, 3) })
  .map(({ V, sign: s, W, a }) =>
    build('gaussian', { V0: s * V, a, ...(W === null ? {} : { W0: -W }) }),
  );
const box = fc
  .record({ V: scaled(-3, 2.5), sign, W: fc.option(scaled(-3, 2)), R: between(0.3, 4) })
  .map(({ V, sign: s, W, R }) =>
    build('squareWell', { V0: s * V, R, ...(W === null ? {} : { W0: -W }) }),
  );
const decaying = fc
  .record({
    form: fc.constantFrom('yukawa', 'exponential', 'hulthen'),
    V: scaled(-3, 2),
    sign,
    a: between(0.2, 1.5),
  })
  .map(({ form, V, sign: s, a }) => build(form, { V0: s * V, a }));
const shell = fc
  .record({ g: scaled(-2, 2), sign, R: between(0.3, 3) })
  .map(({ g, sign: s, R }) => build('deltaShell', { g: s * g, R }));

const anything: fc.Arbitrary<Term[]> = fc.oneof(
  ...[well, bell, box, decaying, shell].map((one) => one.map((term) => [term])),
  fc.tuple(well, decaying),
  fc.tuple(bell, shell),
);

function solved(terms: Term[], k: number) {
  const born = firstBorn(terms, TWO_MU);
  return {
    born,
    found: partialWaves({ terms, born, k, twoMuOverHbar2: TWO_MU, projectileSpin: null }),
  };
}

const scalesOf = (terms: Term[]) => ({
  range: Math.max(...terms.map(({ range }) => range ?? 0)),
  edge: Math.max(0, ...terms.flatMap(({ breakpoints }) => breakpoints)),
  terms: terms.length,
});

describe('partial waves of any interaction', () => {
  it('are answered or refused with a reason; no wave grows, nothing is NaN, every error is finite', () => {
    fc.assert(
      fc.property(anything, scaled(-2, 1.2), (terms, k) => {
        const { found } = solved(terms, k);
        if ('unavailable' in found) {
          expect(found.unavailable.length).toBeGreaterThan(20);
          return;
        }
        for (const { delta, eta, error } of found.waves) {
          expect(eta).toBeLessThanOrEqual(1 + 2 * error);
          expect(Math.abs(delta)).toBeLessThanOrEqual(Math.PI / 2);
          expect(error).toBeLessThan(1e-8);
        }
        for (const share of [0, 0.01, 0.5, 1]) {
          const { re, im, error } = found.shortRange(2 * k * share);
          for (const part of [re, im, error]) expect(Number.isFinite(part)).toBe(true);
        }
        const { scatteringLength, effectiveRange } = found.lowEnergy;
        for (const length of [scatteringLength, effectiveRange]) {
          if (length !== null) expect(Number.isFinite(length.value)).toBe(true);
        }
      }),
      { numRuns: 120 },
    );
  });

  it('obey the optical theorem to 1e-8, the elastic part integrated over angle', () => {
    fc.assert(
      fc.property(anything, scaled(-1, 0.9), (terms, k) => {
        const { found } = solved(terms, k);
        if ('unavailable' in found) return;
        const { moments } = sampleCone((q) => found.shortRange(q), k, scalesOf(terms));
        const elastic = 8 * Math.PI * moments[0];
        const absorbed = 'value' in found.absorption ? found.absorption.value : NaN;
        const forward = found.shortRange(0);
        const total = (4 * Math.PI * forward.im) / k;
        const size = elastic + absorbed;
        // A wave of |f| ~ 1e-12 has an imaginary part of 1e-24: what its error leaves open is no breach.
        const open = (4 * Math.PI * forward.error) / k;
        expect(Math.abs(total - size)).toBeLessThanOrEqual(1e-8 * size + open);
      }),
      { numRuns: 40 },
    );
  });

  it('become first order as the strength goes to zero, at every angle', () => {
    fc.assert(
      fc.property(anything, scaled(-1, 0.8), between(0, 1), (terms, k, share) => {
        const scale = 1e-7 / Math.max(...terms.map(({ strength }) => Math.abs(strength.re)));
        const weak = terms.map((term) => ({
          ...term,
          strength: { re: scale * term.strength.re, im: scale * term.strength.im },
        }));
        const { born, found } = solved(weak, k);
        if ('unavailable' in found) throw new Error(found.unavailable);
        const q = 2 * k * share;
        const [f, f1, forward] = [found.shortRange(q), born.shortRange(q), born.shortRange(0)];
        const size = Math.hypot(forward.re, forward.im);
        const absorbs = weak.reduce((sum, { strength }) => sum + Math.abs(strength.im), 0) * 1e7;
        const apart = Math.hypot(f.re - f1.re, f.im - f1.im);
        expect(apart).toBeLessThan(1e-5 * (1 + absorbs) * size + f.error + f1.error);
      }),
      { numRuns: 60 },
    );
  });
});
