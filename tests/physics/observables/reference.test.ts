import { describe, expect, test } from 'vitest';
import table from '#tests/reference/observables/estimates.json' with { type: 'json' };
import { answer, born1, errorOf, integral } from './bodies.ts';

/**
 * 50-digit estimates from the typed body on (scripts/reference/observables/estimates.py): kinematics, transforms and angular
 * integrals by another language's own routes. Every returned error must bound the true one, and none may be lazy.
 */
const INTEGRALS = ['elastic', 'momentumTransfer', 'viscosity', 'absorption'] as const;
type Pair = number[];
const deviation = (value: number, [high = NaN, low = NaN]: Pair) => Math.abs(value - high - low);

interface Row {
  body: { interaction: { terms: { form: string }[] }; projectile: { species: string } };
  expected: {
    k: Pair;
    differential: { theta: number; dcs: Pair; branches?: Pair[] }[];
    elastic?: Pair;
    momentumTransfer?: Pair;
    viscosity?: Pair;
    absorption?: Pair;
  };
}
const rows: readonly Row[] = table.rows;
const named = rows.map((row) => {
  const forms = row.body.interaction.terms.map(({ form }) => form).join(' + ');
  return [`${row.body.projectile.species}: ${forms}`, row] as const;
});

describe.each(named)('%s', (_, { body, expected }) => {
  const estimate = answer(body);
  const result = born1(estimate);

  test('wave number', () => {
    const { value } = estimate.kinematics.k;
    expect(deviation(value, expected.k)).toBeLessThanOrEqual(1e-15 * value);
  });

  test('every cross section within its error, and the error of use', () => {
    for (const [i, row] of expected.differential.entries()) {
      const point = result.differential[i];
      if (typeof point?.dcs !== 'number') throw new Error(`nothing at ${row.theta}`);
      const error = errorOf(point.dcs, point);
      expect(deviation(point.dcs, row.dcs), `theta ${row.theta}`).toBeLessThanOrEqual(error);
      if (point.relativeError !== undefined) expect(point.relativeError).toBeLessThan(1e-8);
      for (const [j, branch] of (point.branches ?? []).entries()) {
        const wanted = row.branches?.[j] ?? [];
        const got = branch.dcs ?? NaN;
        expect(deviation(got, wanted)).toBeLessThanOrEqual(errorOf(got, branch));
      }
    }
  });

  test('every integral within its error, and that below 1e-11; none for a bare charge', () => {
    for (const name of INTEGRALS) {
      const wanted = expected[name];
      if (wanted === undefined) {
        expect(result.elastic).toMatchObject({ divergent: true });
        continue;
      }
      const { value, error } = integral(result[name]);
      expect(deviation(value, wanted), name).toBeLessThanOrEqual(error);
      expect(error).toBeLessThanOrEqual(1e-11 * value);
    }
  });
});
