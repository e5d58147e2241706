import { describe, expect, test } from 'vitest';
import { NUCLEAR_UNITS, Q, answer, born1, errorOf } from './bodies.ts';

/** Close to 180 degrees q of the partner is what is left of a cosine. Powers of two make both angles exact in degrees. */
const BESIDE = [2 ** -3, 2 ** -7, 2 ** -11, 2 ** -15];

const onItself = (terms: object[], more: object = {}) => ({
  projectile: { species: 'alpha' },
  target: { kind: 'nuclide', nuclide: 'He-4' },
  energy: Q(2, 'MeV'),
  interaction: { terms },
  methods: ['born1'],
  angles: { values: BESIDE.flatMap((x) => [x, 180 - x]) },
  units: NUCLEAR_UNITS,
  ...more,
});

describe.each([
  ['point charges', [{ form: 'coulomb' }]],
  ['a long range', [{ form: 'exponential', V0: Q(-1, 'keV'), a: Q(40, 'pm') }]],
  [
    'charges and a well',
    [{ form: 'coulomb' }, { form: 'gaussian', V0: Q(-2, 'MeV'), a: Q(3, 'fm') }],
  ],
])('identical particles with %s', (_, terms) => {
  test('the curve is the same at x and 180 - x within the errors it gives', () => {
    const points = born1(answer(onItself(terms))).differential;
    for (const x of BESIDE) {
      const [near, far] = [x, 180 - x].map((theta) => {
        const point = points.find((entry) => entry.theta === theta);
        if (typeof point?.dcs !== 'number') throw new Error(`no cross section at ${theta}`);
        return { value: point.dcs, error: errorOf(point.dcs, point) };
      });
      if (!near || !far) throw new Error('two points are due');
      expect(Math.abs(near.value - far.value), `at ${180 - x}`).toBeLessThanOrEqual(
        near.error + far.error,
      );
      expect(far.error, 'and not for being boundless').toBeLessThan(1e-7 * far.value);
    }
  });
});
