import { describe, expect, test } from 'vitest';
import type { ElasticBetween } from '#shared/contracts/aids.ts';
import {
  CONTRACT_BODY,
  NUCLEAR_UNITS,
  Q,
  answer,
  born1,
  integral,
} from '#tests/physics/observables/bodies.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

type Given = Extract<ElasticBetween, { value: number }>;

function between(body: object, from: number, to: number): Given {
  const found = answer({ ...body, aids: { angleRange: { from, to } } }).aids?.elasticBetween;
  if (!found || !('value' in found)) throw new Error(JSON.stringify(found));
  return found;
}

const errorOf = ({ value, relativeError, absoluteError }: Given) =>
  absoluteError ?? value * (relativeError ?? NaN);

const rutherford = {
  projectile: { species: 'alpha' },
  target: { kind: 'fixed', charge: 79 },
  energy: Q(5.486, 'MeV'),
  interaction: { terms: [{ form: 'coulomb' }] },
  methods: ['born1'],
  angles: { values: [90] },
  units: NUCLEAR_UNITS,
};
/** pi (d/2)² (cot²(a/2) - cot²(b/2)), the closed integral of Rutherford's formula; d = Z1 Z2 e²/E, e² = 1.43996455 MeV fm typed here. */
function closedRutherford(from: number, to: number): number {
  const halfDistance = (2 * 79 * 1.43996455) / (2 * 5.486);
  const cot2 = (degrees: number) => 1 / Math.tan((degrees * Math.PI) / 360) ** 2;
  return (Math.PI * halfDistance ** 2 * (cot2(from) - (to === 180 ? 0 : cot2(to)))) / 100;
}

describe('Rutherford, whose integral is closed', () => {
  test.each([
    [1, 180],
    [0.001, 180],
    [30, 60],
    [90, 180],
    [179, 180],
    [1e-6, 1e-5],
  ])('%d to %d degrees', (from, to) => {
    const found = between(rutherford, from, to);
    expectRelative(found.value, closedRutherford(from, to), 5e-9);
    expect(found.relativeError).toBeLessThan(1e-11);
  });

  test('halving a small lowest angle quadruples it, and a large one does more', () => {
    const small = between(rutherford, 0.01, 180);
    expectRelative(small.fromHalf?.ratio ?? NaN, 4, 1e-6);
    expect(small.fromHalf?.from).toBe(0.005);
    const large = between(rutherford, 120, 180);
    // cot²(30°)/cot²(60°) = 9
    expectRelative(large.fromHalf?.ratio ?? NaN, 9, 1e-10);
  });

  test('from zero it diverges, and says so', () => {
    const found = answer({ ...rutherford, aids: { angleRange: { from: 0, to: 90 } } }).aids
      ?.elasticBetween;
    expect(found).toMatchObject({ divergent: true, from: 0, to: 90 });
  });
});

describe('a finite range', () => {
  const whole = integral(born1(answer(CONTRACT_BODY)).elastic);

  test('all angles give the elastic total, to both errors', () => {
    const found = between(CONTRACT_BODY, 0, 180);
    const bound = errorOf(found) + whole.error;
    expect(Math.abs(found.value - whole.value)).toBeLessThanOrEqual(bound);
    expect(bound / whole.value).toBeLessThan(1e-11);
    expect(found.fromHalf).toBeUndefined();
  });

  test('parts add up, and each is known in closed form: 4 pi C² (1/(1+x) differences)', () => {
    // dσ/dΩ = B²/(1 + q²a²)², q² = 2k²(1 - cos θ): π B²/(k²a²) [1/(1+q1²a²) - 1/(1+q2²a²)].
    const k = answer(CONTRACT_BODY).kinematics.k.value;
    const forward = born1(answer(CONTRACT_BODY)).differential[0]?.dcs ?? NaN;
    const q2 = (degrees: number) => (2 * k * Math.sin((degrees * Math.PI) / 360)) ** 2;
    const closed = (a: number, b: number) =>
      ((Math.PI * forward) / k ** 2) * (1 / (1 + q2(a)) - 1 / (1 + q2(b)));
    const edges = [0, 1e-3, 3, 40, 97, 179.99, 180];
    let sum = 0;
    for (const [i, to] of edges.slice(1).entries()) {
      const from = edges[i] ?? 0;
      const found = between(CONTRACT_BODY, from, to);
      expect(Math.abs(found.value - closed(from, to))).toBeLessThanOrEqual(
        // The closed form itself loses digits where the difference is small.
        errorOf(found) + 4e-15 * forward,
      );
      sum += found.value;
    }
    expectRelative(sum, whole.value, 1e-13);
  });

  test('in radians it is the same', () => {
    const inDegrees = between(CONTRACT_BODY, 30, 60).value;
    const body = { ...CONTRACT_BODY, goldenRule: {}, angles: { unit: 'rad', values: [1] } };
    expectRelative(between(body, Math.PI / 6, Math.PI / 3).value, inDegrees, 1e-14);
  });
});

test('a sharp edge that oscillates: against midpoints of the curve itself', () => {
  const well = {
    ...CONTRACT_BODY,
    energy: Q(1000, 'eV'),
    interaction: { terms: [{ form: 'squareWell', V0: Q(-5, 'eV'), R: Q(2, 'angstrom') }] },
  };
  const [from, to, n] = [7, 81, 4000];
  const step = (to - from) / n;
  const values = Array.from({ length: n }, (_, i) => from + (i + 0.5) * step);
  const curve = born1(answer({ ...well, angles: { values } })).differential;
  const sum = curve.reduce(
    (total, { theta, dcs }) =>
      total + (dcs ?? NaN) * 2 * Math.PI * Math.sin((theta * Math.PI) / 180),
    0,
  );
  expectRelative(between(well, from, to).value, (sum * step * Math.PI) / 180, 2e-5);
});

describe('the lab', () => {
  const lab = (projectile: string, target: object) => ({
    projectile: { species: projectile },
    target,
    energy: Q(2, 'MeV'),
    interaction: {
      terms: [{ form: 'yukawa', V0: Q(-1, 'MeV'), a: Q(1.4, 'fm') }],
    },
    identical: false,
    methods: ['born1'],
    angles: { values: [10] },
    frame: 'lab',
    units: NUCLEAR_UNITS,
  });
  /** Midpoints of the lab curve, branches added: the Jacobian is in it, and in no range of the centre of mass. */
  function midpoints(body: object, from: number, to: number, n = 4000): number {
    const step = (to - from) / n;
    const values = Array.from({ length: n }, (_, i) => from + (i + 0.5) * step);
    const curve = born1(answer({ ...body, angles: { values } })).differential;
    const sum = curve.reduce(
      (total, { theta, dcs }) =>
        total + (dcs ?? 0) * 2 * Math.PI * Math.sin((theta * Math.PI) / 180),
      0,
    );
    return (sum * step * Math.PI) / 180;
  }

  test.each([
    ['proton', { kind: 'nuclide', nuclide: 'C-12' }, 20, 130],
    ['neutron', { kind: 'species', species: 'proton' }, 15, 70],
    ['alpha', { kind: 'species', species: 'proton' }, 3, 12],
  ] as const)('%s on %o between %d and %d degrees', (projectile, target, from, to) => {
    const body = lab(projectile, target);
    expectRelative(between(body, from, to).value, midpoints(body, from, to), 2e-6);
  });

  test('an alpha particle on a proton: two branches to one angle, and all of it inside the cone', () => {
    const body = lab('alpha', { kind: 'species', species: 'proton' });
    const inside = between(body, 3, 12);
    expect(inside.centreOfMass).toHaveLength(2);
    expect(inside.remarks.join()).toContain('Two centre-of-mass angles');
    const whole = integral(born1(answer(body)).elastic).value;
    const all = between(body, 0, 90);
    expect(all.centreOfMass).toHaveLength(1);
    expectRelative(all.value, whole, 1e-12);
    expectRelative(between(body, 0, 3).value + between(body, 3, 90).value, whole, 1e-12);
    expect(between(body, 20, 90).value).toBe(0);
  });

  test('equal masses: all lab angles give the elastic total', () => {
    const body = lab('neutron', { kind: 'species', species: 'proton' });
    expectRelative(between(body, 0, 90).value, integral(born1(answer(body)).elastic).value, 1e-3);
    expectRelative(between(body, 0, 180).value, integral(born1(answer(body)).elastic).value, 1e-12);
  });
});

test('identical particles: both are counted, twice the elastic total over all angles', () => {
  const body = {
    projectile: { species: 'alpha' },
    target: { kind: 'species', species: 'alpha' },
    energy: Q(2, 'MeV'),
    interaction: { terms: [{ form: 'gaussian', V0: Q(-1, 'MeV'), a: Q(2, 'fm') }] },
    methods: ['born1'],
    units: NUCLEAR_UNITS,
  };
  const found = between(body, 0, 180);
  expectRelative(found.value, 2 * integral(born1(answer(body)).elastic).value, 1e-12);
  expect(found.remarks[0]).toContain('twice the elastic');
  expectRelative(between(body, 0, 90).value, found.value / 2, 1e-12);
});

describe('refusals name the field', () => {
  test.each([
    [{ from: 60, to: 30 }, '/aids/angleRange/to'],
    [{ from: 60, to: 60 }, '/aids/angleRange/to'],
    [{ from: -1, to: 30 }, '/aids/angleRange/from'],
    [{ from: 0, to: 181 }, '/aids/angleRange/to'],
  ])('%o', (angleRange, path) => {
    expect(() => answer({ ...CONTRACT_BODY, aids: { angleRange } })).toThrow(path);
  });

  test('a hard sphere has no first order to integrate', () => {
    const body = {
      ...CONTRACT_BODY,
      interaction: { terms: [{ form: 'hardSphere', R: Q(1, 'angstrom') }] },
      aids: { angleRange: { from: 0, to: 90 } },
    };
    expect(answer(body).aids?.elasticBetween).toMatchObject({ unavailable: true });
  });
});

test.each([
  // Recomputed outside this project in 30 digits, cut where one formula of the factor goes over into the next.
  [9.074, 'C', 0.02028062369953305],
  [30, 'C', 0.0024403986187294204],
  [20, 'Au', 0.4651625749983279],
])(
  'electrons of %d keV on %s: the joins of the scattering factor do not hide an error',
  (energy, element, exact) => {
    const body = {
      projectile: { species: 'electron' },
      target: { kind: 'fixed', charge: 0 },
      energy: Q(energy, 'keV'),
      kinematics: 'relativistic',
      interaction: { terms: [{ form: 'atomicElectron', element }] },
      methods: ['born1'],
      angles: { values: [90] },
    };
    const found = between(body, 5, 180);
    const error = errorOf(found);
    expect(Math.abs(found.value - exact)).toBeLessThanOrEqual(error + Number.EPSILON * exact);
    expect(error).toBeLessThan(1e-12 * exact);
  },
);
