import { describe, expect, test } from 'vitest';
import { energyNodes } from '#server/physics/counting/energies.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const moment = (nodes: ReturnType<typeof energyNodes>, n: number, about: number) =>
  nodes.reduce((sum, { energy, weight }) => sum + weight * (energy - about) ** n, 0);

describe('energies of the collisions', () => {
  test.each([
    [0.01, 3, 5],
    [0.1, 5, 9],
  ])(
    'a spread of %d of the energy has the moments of a Gaussian: %i points, degree %i',
    (spread, points, degree) => {
      const nodes = energyNodes(1, spread, null);
      expect(nodes).toHaveLength(points);
      const expected = [1, 0, 1, 0, 3, 0, 15, 0, 105, 0];
      for (let n = 0; n <= degree; n++) {
        const wanted = (expected[n] ?? NaN) * spread ** n;
        const found = moment(nodes, n, 1);
        if (wanted === 0) expect(Math.abs(found)).toBeLessThan(1e-15);
        else expectRelative(found, wanted, 1e-10);
      }
    },
  );

  test.each([
    [0.04, 3],
    [0.3, 8],
  ])('a loss of %d of the energy is spread evenly: %i depths', (lost, points) => {
    const nodes = energyNodes(1, 0, (depth) => lost * depth);
    expect(nodes).toHaveLength(points);
    expectRelative(moment(nodes, 0, 1), 1, 1e-13);
    expectRelative(moment(nodes, 1, 1), -lost / 2, 1e-12);
    expectRelative(moment(nodes, 4, 1), lost ** 4 / 5, 1e-11);
    nodes.forEach(({ energy, depth }) => expectRelative(energy, 1 - lost * (depth ?? NaN), 1e-14));
  });

  test('neither: one energy; both: their variances add up', () => {
    expect(energyNodes(7, 0, null)).toEqual([{ energy: 7, weight: 1, depth: null }]);
    const both = energyNodes(1, 0.01, (depth) => 0.04 * depth);
    expect(both).toHaveLength(9);
    const mean = 1 + moment(both, 1, 1);
    expectRelative(moment(both, 2, mean), 0.01 ** 2 + 0.04 ** 2 / 12, 1e-9);
  });
});
