import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { deviation, readReference, type Split } from '#tests/physics/numerics/reference-table.ts';
import { firstBorn } from '#server/physics/methods/born1.ts';
import { tabulated } from '#server/physics/potentials/tabulated.ts';
import { TABLE_TAILS, type TableTail } from '#server/physics/potentials/table-tail.ts';
import type { Points } from '#server/physics/potentials/types.ts';
import { DomainError } from '#shared/errors.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { CONTEXT, transform, unitTerm } from './build-term.ts';

interface Tables {
  points: Record<string, [number, number][]>;
  transforms: (Split & { table: string; tail: TableTail; q: number })[];
  values: (Split & { table: string; r: number })[];
}
const tables = readReference<Tables>('potentials/tabulated.json');
const termOf = (points: Points, tail: TableTail) => tabulated.build({ points, tail }, CONTEXT);
const sampled = (f: (r: number) => number, r: readonly number[]) =>
  r.map((x): [number, number] => [x, f(x)]);
const even = (last: number, count: number) =>
  Array.from({ length: count }, (_, i) => (last * i) / (count - 1));

describe('tables against splines of 60 digits', () => {
  const terms = new Map(
    Object.entries(tables.points).flatMap(([name, points]) =>
      TABLE_TAILS.map((tail) => [`${name} ${tail}`, termOf(points, tail)] as const),
    ),
  );

  it('closed and quadrature lie within their errors', () => {
    for (const row of tables.transforms) {
      const term = terms.get(`${row.table} ${row.tail}`);
      if (!term) throw new Error(`no table ${row.table}`);
      for (const route of ['closed', 'quadrature'] as const) {
        const { value, error, status } = transform(term, route, row.q);
        const where = `${route} ${row.table} ${row.tail} ${row.q}`;
        expect(deviation(value, row), where).toBeLessThanOrEqual(error);
        expect(status, where).toBe('converged');
        const point = row.q === 0 ? 0 : Math.abs(term.coulombTail) / row.q ** 2;
        expect(error, where).toBeLessThanOrEqual(6e-14 * term.norm + 3e-15 * point);
      }
    }
  });

  it('V(r) is that of the spline between the points', () => {
    for (const row of tables.values) {
      const term = terms.get(`${row.table} zero`);
      const size = Math.max(...(tables.points[row.table] ?? []).map(([, V]) => Math.abs(V)));
      expect(deviation(term?.v?.(row.r) ?? NaN, row)).toBeLessThanOrEqual(4e-15 * size);
    }
  });
});

describe('tables', () => {
  it('closed form and quadrature agree for any table', () => {
    const widths = fc.array(fc.double({ min: 0.1, max: 1, noNaN: true }), {
      minLength: 5,
      maxLength: 40,
    });
    fc.assert(
      fc.property(
        widths,
        fc.array(fc.double({ min: -20, max: 20, noNaN: true }), { minLength: 40, maxLength: 40 }),
        fc.constantFrom('zero', 'coulomb') as fc.Arbitrary<TableTail>,
        fc.double({ min: 1e-3, max: 60, noNaN: true }),
        (steps, values, tail, q) => {
          let r = 0;
          const points = steps.map((width, i): [number, number] => [(r += width), values[i] ?? 0]);
          const term = termOf(points, tail);
          const [closed, quadrature] = [
            transform(term, 'closed', q),
            transform(term, 'quadrature', q),
          ];
          const apart = Math.abs(closed.value - quadrature.value);
          expect(apart).toBeLessThanOrEqual(closed.error + quadrature.error);
          expect(apart).toBeLessThanOrEqual(
            Math.max(1e-9 * Math.abs(closed.value), 1e-14 * term.norm),
          );
        },
      ),
      { numRuns: 80 },
    );
  });

  it.each(TABLE_TAILS)('%s: the error covers a q known to eight roundings', (tail) => {
    const term = termOf(tables.points['screened'] ?? [], tail);
    for (let i = 0; i < 200; i++) {
      const q = 10 ** (-2 + i / 50);
      const step = 1e-6 / (1 + q);
      const above = transform(term, 'closed', q * (1 + step)).value;
      const below = transform(term, 'closed', q * (1 - step)).value;
      const slope = Math.abs(above - below) / (2 * step);
      const size = term.norm + Math.abs(term.coulombTail) / q ** 2;
      const noise = (2e-15 * size) / step;
      const { error } = transform(term, 'closed', q);
      expect(8 * 2 ** -53 * slope, `q = ${q}`).toBeLessThanOrEqual(error + 8 * 2 ** -53 * noise);
    }
  });

  it('a fine table of a Gaussian has the transform of the Gaussian, closer with the fourth power of the step', () => {
    const gaussian = unitTerm('gaussian', { a: 1 });
    const table = (count: number) =>
      termOf(sampled(gaussian.v ?? Math.exp, even(7, count)), 'zero');
    const gap = (count: number, q: number) =>
      Math.abs(transform(table(count), 'closed', q).value - transform(gaussian, 'closed', q).value);
    for (const q of [0, 0.5, 2, 4]) {
      expect(gap(400, q)).toBeLessThan(1e-8);
      expect(gap(100, q) / gap(200, q)).toBeGreaterThan(10);
    }
    // The doubt says how coarse the table is: it shrinks with the square of the step.
    const doubt = (count: number) => table(count).interpolationDoubt?.(1) ?? NaN;
    expectRelative(doubt(100) / doubt(200), 4, 0.05);
    expect(doubt(400)).toBeGreaterThan(gap(400, 1));
  });

  it('exponential tail: a table of an exponential goes on as it was', () => {
    const exponential = unitTerm('exponential', { a: 0.8 });
    const term = termOf(sampled(exponential.v ?? Math.exp, even(4, 300)), 'exponential');
    for (const q of [0, 0.3, 2]) {
      const gap = transform(term, 'closed', q).value / transform(exponential, 'closed', q).value;
      expectRelative(gap, 1, 1e-7);
    }
    expectRelative(term.v?.(9) ?? NaN, Math.exp(-9 / 0.8), 1e-11);
    expectRelative(term.norm, exponential.norm, 1e-7);
    expectRelative(term.firstMoment ?? NaN, exponential.firstMoment ?? NaN, 1e-7);
    for (const from of [0.2, 3, 7]) {
      expectRelative(term.lineIntegral(from) ?? NaN, exponential.lineIntegral(from) ?? NaN, 1e-7);
    }
    expect(term).toMatchObject({ tail: 'exponential', coulombTail: 0 });
    expect(term.v?.(term.reach ?? NaN)).toBeLessThan(1e-17);
  });

  it('coulomb tail: a table of a charged sphere is extendedCharge', () => {
    const sphere = (r: number) => (r < 1 ? (3 - r * r) / 2 : 1 / r);
    const term = termOf(sampled(sphere, even(2, 401)), 'coulomb');
    expectRelative(term.coulombTail, 1, 1e-14);
    for (const q of [0.1, 1, 3]) {
      const F = (3 * (Math.sin(q) - q * Math.cos(q))) / q ** 3;
      expect(Math.abs(transform(term, 'closed', q).value - F / q ** 2)).toBeLessThan(1e-7);
    }
    expectRelative(term.norm, 0.1, 1e-5);
    expect(term).toMatchObject({ tail: 'coulomb', reach: null, firstMoment: null });
    expect(term.lineIntegral(0.5)).toBeNull();
    expect(transform(term, 'closed', 0).value).toBe(Infinity);
    const born = firstBorn([term], CONTEXT.twoMuOverHbar2);
    expect(born.amplitude(0)).toBeNull();
    expectRelative(born.shortRange(0).re, CONTEXT.twoMuOverHbar2 * 0.1, 1e-5);
  });

  it('zero tail: a step of constant rows is a square well', () => {
    const term = termOf(
      sampled(() => -3, [0.5, 1, 1.5, 2]),
      'zero',
    );
    const well = unitTerm('squareWell', { R: 2 });
    for (const q of [0, 0.7, 5, 40]) {
      const [one, other] = [transform(term, 'closed', q), transform(well, 'closed', q)];
      expect(Math.abs(one.value + 3 * other.value)).toBeLessThanOrEqual(
        one.error + 3 * other.error,
      );
    }
    expect(term).toMatchObject({ tail: 'compact', reach: 2, breakpoints: [0.5, 2] });
    expect([term.v?.(0.01), term.v?.(1.99), term.v?.(2.01)]).toEqual([-3, -3, 0]);
    expectRelative(term.norm, 8, 1e-14);
    expectRelative(term.lineIntegral(0.5) ?? NaN, -4.5, 1e-14);
  });

  it('lengths and depths in other units give the same S', () => {
    const points = tables.points['nuclear'] ?? [];
    const one = termOf(points, 'exponential');
    const other = termOf(
      points.map(([r, V]) => [r * 1e5, V / 1e6] as const),
      'exponential',
    );
    for (const q of [0, 3e3, 5e4]) {
      const [a, b] = [transform(one, 'closed', q), transform(other, 'closed', q / 1e5)];
      const apart = Math.abs(a.value * 1e9 - b.value);
      expect(apart).toBeLessThanOrEqual(a.error * 1e9 + b.error + 3e-14 * other.norm);
    }
  });

  it('a table of zeros has no strength', () => {
    const term = termOf(
      sampled(() => 0, even(3, 6)),
      'exponential',
    );
    expect(term.strength.re).toBe(0);
    expect(transform(term, 'closed', 1).value).toBe(0);
    expect(firstBorn([term], 1).amplitude(0)).toMatchObject({ re: 0, error: 0 });
  });
});

describe('tables that are refused', () => {
  const message = (points: unknown, tail: string = 'zero'): string => {
    try {
      tabulated.build({ points: points as Points, tail }, CONTEXT);
    } catch (error) {
      if (error instanceof DomainError)
        return `${error.details.errors?.[0]?.path}: ${error.message}`;
      throw error;
    }
    return 'taken';
  };
  const good = sampled((r) => -Math.exp(-r), even(3, 10));
  const withRow = (i: number, row: [number, number]) => good.map((old, k) => (k === i ? row : old));

  it('out of order, twice the same r, no numbers, negative r: with the row', () => {
    expect(message(good)).toBe('taken');
    expect(message(withRow(4, [0.1, -1]))).toMatch(/^\/points\/4: row 5: r must rise/);
    expect(message(withRow(4, [1, -1]))).toMatch(/^\/points\/4: row 5: r must rise/);
    expect(message(withRow(4, [NaN, -1]))).toMatch(/row 5: r and V must both be numbers/);
    expect(message(withRow(4, [4 / 3, Infinity]))).toMatch(/row 5: r and V must both be numbers/);
    expect(message(withRow(0, [-0.1, -1]))).toMatch(/row 1: r must lie between 0/);
    expect(message(withRow(4, [4 / 3, 1e16]))).toMatch(/row 5: V must lie within/);
  });

  it('a gap, too short, too long, no table', () => {
    const gap = sampled((r) => -Math.exp(-r), [0, 0.1, 0.2, 0.3, 9, 9.1, 9.2]);
    expect(message(gap)).toMatch(
      /^\/points\/4: row 5: there is a gap before it, from r = 0.3 to 9/,
    );
    expect(message(good.slice(0, 3))).toMatch(/^\/points: a table of 3 rows is too short/);
    const million = Array.from({ length: 1_000_000 }, (_, i) => [i, 1]);
    expect(message(million)).toMatch(/^\/points: a table of 1000000 rows is too long/);
    expect(message('1 2')).toMatch(/^\/points: points must be a list/);
    expect(message(undefined)).toMatch(/points is missing/);
  });

  it('a tail that does not exist or does not fit', () => {
    expect(message(good, 'linear')).toMatch(
      /^\/tail: tail must be one of zero, exponential, coulomb/,
    );
    const rising = sampled((r) => -1 - r, even(3, 10));
    expect(message(rising, 'exponential')).toMatch(/^\/tail: the last two rows do not fall/);
    expect(
      message(
        sampled((r) => 2 - r, even(2.5, 6)),
        'exponential',
      ),
    ).toMatch(/do not fall/);
    expect(
      message(
        sampled(() => 1, even(2.5, 6)),
        'exponential',
      ),
    ).toMatch(/do not fall/);
    expect(
      message(
        sampled((r) => 2.5 - r, even(2.5, 6)),
        'exponential',
      ),
    ).toBe('taken');
  });
});
