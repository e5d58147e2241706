import { describe, expect, test } from 'vitest';
import { Q, answer, born1, errorOf } from './bodies.ts';

/*
 * Where the masses are nearly equal, what a lab angle leads to rests on the difference of the two, and on their last digits. The same
 * pair written in eV and in u has masses that differ by a rounding or two: both answers must be right within what they say.
 */
const U = 931494103.72;
const LIGHT = 938272089.43;

const pair = (projectile: number, target: number, unit: 'eV' | 'u', angles: number[]) => ({
  projectile: { species: 'custom', mass: Q(projectile, unit), charge: 1, spin: 0.5 },
  target: { kind: 'custom', mass: Q(target, unit), charge: 1, spin: 0.5 },
  energy: Q(1, 'keV'),
  interaction: { terms: [{ form: 'screenedCoulomb', a: Q(0.5, 'angstrom') }] },
  methods: ['born1'],
  frame: 'lab',
  angles: { values: angles },
});

function points(body: object) {
  return born1(answer(body)).differential.flatMap(({ theta, branches, ...point }) =>
    (branches ?? [point]).map((way, i) => {
      if (typeof way.dcs !== 'number') throw new Error(`no cross section at ${theta}`);
      return { theta, i, value: way.dcs, error: errorOf(way.dcs, way) };
    }),
  );
}

describe.each([1e-3, 1e-5, 1e-7])('masses that differ by a part of %d', (part) => {
  test.each([
    ['the lighter on the heavier, backwards', LIGHT, LIGHT * (1 + part), [89, 91, 120, 179]],
    ['the heavier on the lighter, both ways', LIGHT * (1 + part), LIGHT, [1, 45, 80]],
  ])('%s', (_, projectile, target, angles) => {
    const first = points(pair(projectile, target, 'eV', angles));
    const second = points(pair(projectile / U, target / U, 'u', angles));
    first.forEach(({ theta, i, value, error }, at) => {
      const other = second[at];
      if (!other) throw new Error('both have the same ways');
      const apart = Math.abs(value - other.value);
      expect(apart, `${theta}, way ${i}`).toBeLessThanOrEqual(error + other.error);
      expect(error, `${theta}, way ${i}`).toBeLessThan((1e-13 / part) * value);
    });
  });
});
