import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { transform, unitTerm } from './build-term.ts';

/** Power of length in S: three for a shape without unit, two for 1/r and for delta(r-R). */
const FORMS: [string, string[], number][] = [
  ['yukawa', ['a'], 3],
  ['screenedCoulomb', ['a'], 2],
  ['squareWell', ['R'], 3],
  ['gaussian', ['a'], 3],
  ['exponential', ['a'], 3],
  ['woodsSaxon', ['R', 'a'], 3],
  ['deltaShell', ['R'], 2],
  ['hulthen', ['a'], 3],
  ['polarization', ['d'], -1],
];
const length = fc.double({ min: 1e-6, max: 100, noNaN: true });
const factor = fc.double({ min: 1e-4, max: 1e4, noNaN: true });

describe('scaling of all lengths', () => {
  it.each(FORMS)('%s: lengths times lambda, q over lambda', (form, keys, power) => {
    const lengths = fc.tuple(length, length);
    fc.assert(
      fc.property(
        lengths,
        factor,
        fc.double({ min: 0, max: 300, noNaN: true }),
        (two, lambda, x) => {
          const named = (scale: number) =>
            Object.fromEntries(keys.map((key, i) => [key, (two[i] ?? 1) * scale]));
          const small = unitTerm(form, named(1));
          const large = unitTerm(form, named(lambda));
          const q = x / (small.range ?? 1);
          const one = transform(small, 'closed', q);
          const other = transform(large, 'closed', q / lambda);
          const scale = lambda ** power;
          // The product a·lambda is rounded: four u of it move the phase and the volume.
          const rounding = 2 ** -50 * (1 + x) * small.norm;
          expect(Math.abs(other.value / scale - one.value)).toBeLessThanOrEqual(
            one.error + other.error / scale + rounding,
          );
        },
      ),
      { numRuns: 200 },
    );
  });

  it('woodsSaxon: no pair of lengths and no q gives NaN or an error beyond the norm', () => {
    const any = fc.double({ min: 1e-12, max: 1e12, noNaN: true });
    const wave = fc.double({ min: 0, max: 1e12, noNaN: true });
    fc.assert(
      fc.property(any, any, wave, (R, a, q) => {
        const term = unitTerm('woodsSaxon', { R, a });
        const { value, error } = transform(term, 'closed', q);
        expect(Number.isFinite(value) && Number.isFinite(error)).toBe(true);
        expect(Math.abs(value)).toBeLessThanOrEqual(term.norm * (1 + 1e-14) + error);
      }),
      { numRuns: 2000 },
    );
  });
});
