import { describe, expect, it } from 'vitest';
import { transform, unitTerm } from './build-term.ts';

const KR = [1e-3, 0.03, 0.5, 1, 2.2467, 5, 20, 100, 400, 1000];
const THETA = Array.from({ length: 25 }, (_, i) => (i * 7.5 * Math.PI) / 180);
const A_OVER_R = [1e-6, 1e-3, 0.02, 0.1, 0.1625, 0.5, 1, 1.01, 4, 100];

const CASES: [string, Record<string, number>][] = [
  ...[4e-5, 0.37, 7.25].flatMap((length): [string, Record<string, number>][] => [
    ['yukawa', { a: length }],
    ['screenedCoulomb', { a: length }],
    ['gaussian', { a: length }],
    ['exponential', { a: length }],
    ['squareWell', { R: length }],
    ['deltaShell', { R: length }],
    ['hulthen', { a: length }],
    ['polarization', { d: length }],
  ]),
  ['moliere', { Z: 1 }],
  ['moliere', { Z: 79 }],
  ['krc', { Z1: 2, Z2: 79 }],
  ['universalIon', { Z1: 2, Z2: 79 }],
  ['universalIon', { Z1: 92, Z2: 1 }],
  ...A_OVER_R.map((a): [string, Record<string, number>] => ['woodsSaxon', { R: 1, a }]),
  ['woodsSaxon', { R: 0, a: 1 }],
  ['woodsSaxon', { R: 4e-5, a: 0.65e-5 }],
];

describe('closed form and quadrature', () => {
  it.each(CASES)(
    '%s %o: agree to 1e-9 of the amplitude or 1e-14 of the norm, theta 0 to 180, kR 1e-3 to 1e3',
    (form, lengths) => {
      const term = unitTerm(form, lengths);
      for (const kR of KR) {
        for (const theta of THETA) {
          const q = ((2 * kR) / (term.range ?? NaN)) * Math.sin(theta / 2);
          const closed = transform(term, 'closed', q);
          const quadrature = transform(term, 'quadrature', q);
          const apart = Math.abs(closed.value - quadrature.value);
          const allowed = Math.max(1e-9 * Math.abs(closed.value), 1e-14 * term.norm);
          const where = `kR ${kR}, theta ${theta}`;
          expect(apart, where).toBeLessThanOrEqual(allowed);
          expect(apart, where).toBeLessThanOrEqual(closed.error + quadrature.error);
          expect(quadrature.status, where).toBe('converged');
          expect(quadrature.evaluations, where).toBeLessThan(300_000);
        }
      }
    },
  );
});
