import { describe, expect, it } from 'vitest';
import { transform, unitTerm } from './build-term.ts';

const CASES: [string, Record<string, number>][] = [
  ['yukawa', { a: 1 }],
  ['screenedCoulomb', { a: 1 }],
  ['gaussian', { a: 1 }],
  ['exponential', { a: 1 }],
  ['squareWell', { R: 1 }],
  ['deltaShell', { R: 1 }],
  ['hulthen', { a: 1 }],
  ['polarization', { d: 1 }],
  ['moliere', { Z: 13 }],
  ['krc', { Z1: 2, Z2: 79 }],
  ['universalIon', { Z1: 2, Z2: 79 }],
  ['woodsSaxon', { R: 1, a: 0.01 }],
  ['woodsSaxon', { R: 1, a: 0.16 }],
  ['woodsSaxon', { R: 1, a: 0.9 }],
  ['woodsSaxon', { R: 0.2, a: 1 }],
  ['woodsSaxon', { R: 0, a: 1 }],
];
const UNIT = 2 ** -53;

describe('error of the closed forms', () => {
  it.each(CASES)('%s %o covers a q that is known to eight roundings', (form, lengths) => {
    const term = unitTerm(form, lengths);
    for (let i = 0; i < 400; i++) {
      const q = 10 ** (-3 + i / 80);
      const step = 1e-6 / (1 + q);
      const above = transform(term, 'closed', q * (1 + step)).value;
      const below = transform(term, 'closed', q * (1 - step)).value;
      const slope = Math.abs(above - below) / (2 * step);
      const noise = (1e-15 * term.norm) / step;
      const { error } = transform(term, 'closed', q);
      expect(8 * UNIT * slope, `q = ${q}`).toBeLessThanOrEqual(error + 8 * UNIT * noise);
    }
  });
});
