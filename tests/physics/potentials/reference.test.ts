import { describe, expect, it } from 'vitest';
import { deviation, readReference, type Split } from '#tests/physics/numerics/reference-table.ts';
import { screenedTerm, screensOf } from '#server/physics/potentials/screening-sum.ts';
import { transform, unitTerm } from './build-term.ts';

interface Row extends Split {
  R?: number;
  a?: number;
  d?: number;
  q: number;
  quadrature: boolean;
}

const FORMS = [
  'yukawa',
  'screenedCoulomb',
  'squareWell',
  'gaussian',
  'exponential',
  'woodsSaxon',
  'deltaShell',
  'moliere',
  'krc',
  'universalIon',
  'hulthen',
  'polarization',
];
const UNIT = 2 ** -53;

function rowsOf(form: string): Row[] {
  return readReference<{ rows: Row[] }>(`potentials/${form}.json`).rows;
}

const SCREENED = ['moliere', 'krc', 'universalIon'] as const;

function termOf(form: string, { R, a, d }: Row) {
  const screened = SCREENED.find((key) => key === form);
  // Their length follows from the charges: here it is given, so that it is exact.
  if (screened) return screenedTerm(form, 1, screensOf(screened), a ?? NaN);
  const lengths = Object.entries({ R, a, d }).filter(([, value]) => value !== undefined);
  return unitTerm(form, Object.fromEntries(lengths) as Record<string, number>);
}

describe.each(FORMS)('%s against transforms of 30 digits', (form) => {
  const rows = rowsOf(form);

  it('has a table with q = 0, small, large and the zeros, and quadrature behind it', () => {
    expect(rows.length).toBeGreaterThanOrEqual(48);
    expect(rows.some((row) => row.q === 0)).toBe(true);
    if (form !== 'deltaShell') {
      expect(rows.filter((row) => row.quadrature).length).toBeGreaterThan(rows.length / 2 - 1);
    }
  });

  it.each(['closed', 'quadrature'] as const)('%s: the error bounds the deviation', (route) => {
    for (const row of rows) {
      const { value, error, status } = transform(termOf(form, row), route, row.q);
      expect(status).toBe('converged');
      expect(deviation(value, row), JSON.stringify(row)).toBeLessThanOrEqual(error);
    }
  });

  it('closed: the error is at most a hundred roundings of what has to be added up', () => {
    for (const row of rows) {
      const term = termOf(form, row);
      const { error } = transform(term, 'closed', row.q);
      // q carries 8 u, so the phase qR and the exponents π q a and (qa)²/4 decide where they are large.
      const size = Math.abs(row.high);
      const phase = form === 'woodsSaxon' || form === 'squareWell' || form === 'deltaShell';
      const exponent = form === 'gaussian' ? (row.q * (row.a ?? 0)) ** 2 : row.q * (row.d ?? 0);
      const allowed = (100 + 10 * exponent) * UNIT * size + (phase ? 25 * UNIT * term.norm : 0);
      expect(error, JSON.stringify(row)).toBeLessThanOrEqual(allowed + 2 ** -1022);
    }
  });

  it('quadrature: the error stays below the blur of the phase', () => {
    for (const row of rows) {
      const term = termOf(form, row);
      const { error } = transform(term, 'quadrature', row.q);
      const blur = form === 'deltaShell' ? 1 + row.q * (term.range ?? 0) : 30;
      expect(error, JSON.stringify(row)).toBeLessThanOrEqual(blur * 1e-15 * term.norm);
    }
  });
});
