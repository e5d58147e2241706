import { describe, expect, test } from 'vitest';
import type { KinematicsTable, Reference } from '#shared/contracts/aids.ts';
import {
  CONTRACT_BODY,
  NUCLEAR_UNITS,
  Q,
  answer,
  born1,
} from '#tests/physics/observables/bodies.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

function referenceOf(body: object): Extract<Reference, { kind: string }> {
  const found = answer({ ...body, aids: { reference: true } }).aids?.reference;
  if (!found || 'unavailable' in found) throw new Error(JSON.stringify(found));
  return found;
}

function kinematicsOf(body: object): KinematicsTable {
  const found = answer({ ...body, aids: { kinematics: true } }).aids?.kinematics;
  if (!found) throw new Error('no table');
  return found;
}

const onGold = (term: object, rest: object = {}) => ({
  projectile: { species: 'alpha' },
  target: { kind: 'nuclide', nuclide: 'Au-197' },
  energy: Q(1, 'MeV'),
  interaction: { terms: [term] },
  methods: ['born1'],
  angles: { values: [0, 10, 90, 170] },
  units: NUCLEAR_UNITS,
  ...rest,
});

describe('the ratio to Rutherford', () => {
  test('is one for a bare charge wherever both have a value', () => {
    const { kind, chargeProduct, charges, points } = referenceOf(onGold({ form: 'coulomb' }));
    expect({ kind, chargeProduct, charges }).toEqual({
      kind: 'rutherford',
      chargeProduct: 158,
      charges: 'interaction',
    });
    expect(points[0]).toMatchObject({ theta: 0, dcs: null, ratio: null });
    for (const { ratio } of points.slice(1)) expect(ratio).toBe(1);
  });

  test('of a screened charge is (q²a²/(1 + q²a²))², smallest forward', () => {
    const body = onGold({ form: 'screenedCoulomb', a: Q(0.1, 'angstrom') });
    const points = referenceOf(body).points;
    const q = born1(answer(body)).differential.map((point) => (point.q ?? NaN) * 1e4);
    for (const [i, { ratio, theta }] of points.entries()) {
      if (theta === 0) continue;
      const x = (q[i] ?? NaN) ** 2;
      expectRelative(ratio ?? NaN, (x / (1 + x)) ** 2, 1e-12);
    }
    expect(points[1]?.ratio ?? 2).toBeLessThan(points[3]?.ratio ?? 0);
  });

  test('in the lab, 1 MeV helium on gold at 170 degrees: the handbook value 32.822 b/sr', () => {
    // W. K. Chu, J. W. Mayer and M.-A. Nicolet, Backscattering Spectrometry (1978); digits as recomputed from its formula.
    const body = onGold({ form: 'screenedCoulomb', a: Q(0.1, 'angstrom') }, { frame: 'lab' });
    expectRelative(referenceOf(body).points[3]?.dcs ?? NaN, 32.822, 2e-5);
  });

  test('takes the charges of the particles where the interaction has none', () => {
    const body = onGold({ form: 'woodsSaxon', V0: Q(-50, 'MeV'), R: Q(7, 'fm'), a: Q(0.6, 'fm') });
    expect(referenceOf(body)).toMatchObject({ charges: 'particles', chargeProduct: 158 });
  });

  test('and a stated charge product before them', () => {
    expect(referenceOf(onGold({ form: 'coulomb', chargeProduct: -20 }))).toMatchObject({
      chargeProduct: -20,
    });
  });

  test('of a relativistic electron holds its spin: the values of Mott at 90 degrees', () => {
    // 1 MeV on aluminium and 100 keV on gold, fixed point charges, recomputed from Mott's formula outside this project.
    for (const [charge, energy, barn] of [
      [13, 1, 1.0903266],
      [79, 0.1, 3260.87],
    ] as const) {
      const body = onGold(
        { form: 'screenedCoulomb', a: Q(0.2, 'angstrom') },
        {
          projectile: { species: 'electron' },
          target: { kind: 'fixed', charge },
          energy: Q(energy, 'MeV'),
          kinematics: 'relativistic',
        },
      );
      const { kind, points } = referenceOf(body);
      expect(kind).toBe('mott');
      expectRelative(points[2]?.dcs ?? NaN, barn, 2e-6);
      expect(points[1]?.ratio ?? 2).toBeLessThan(1);
    }
  });

  test('is refused in words without charges', () => {
    const found = answer({ ...CONTRACT_BODY, aids: { reference: true } }).aids?.reference;
    expect(found).toMatchObject({ unavailable: true });
  });
});

describe('the table of kinematics', () => {
  test('kinematic factors of helium at 170 degrees', () => {
    // Chu, Mayer and Nicolet (1978); remembered digits, reproduced to them by the formula; atomic masses, as the handbook takes them.
    const masses = {
      12.011: 0.2526,
      15.999: 0.3625,
      26.98: 0.5525,
      28.086: 0.5657,
      63.546: 0.7785,
      196.97: 0.9225,
    };
    for (const [mass, factor] of Object.entries(masses)) {
      const target = { kind: 'custom', mass: Q(Number(mass), 'u'), charge: 6, spin: 0 };
      const projectile = { species: 'custom', mass: Q(4.0026, 'u'), charge: 2, spin: 0 };
      const rest = { projectile, target, frame: 'lab', angles: { values: [170] } };
      const body = onGold({ form: 'coulomb' }, rest);
      expectRelative(kinematicsOf(body).rows[0]?.ways[0]?.kept ?? NaN, factor, 2e-4);
    }
  });

  test('alpha on a proton at 10 degrees: 53.61703 and 146.38297 in the centre of mass, Jacobians 29.68986 and 14.04088', () => {
    const target = { kind: 'species', species: 'proton' };
    const table = kinematicsOf(
      onGold({ form: 'coulomb' }, { target, frame: 'lab', angles: { values: [10, 20] } }),
    );
    const [first, second] = table.rows[0]?.ways ?? [];
    expectRelative(first?.thetaCm ?? NaN, 53.61703, 2e-6);
    expectRelative(first?.jacobian ?? NaN, 29.68986, 2e-5);
    expectRelative(second?.thetaCm ?? NaN, 146.38297, 2e-6);
    expectRelative(second?.jacobian ?? NaN, 14.04088, 2e-5);
    expectRelative(table.largestLabAngle ?? NaN, 14.57957, 2e-6);
    expect(table.rows[1]?.ways).toEqual([]);
  });

  test('energies add up and momentum is kept, angle by angle', () => {
    const target = { kind: 'nuclide', nuclide: 'C-12' };
    const body = onGold({ form: 'coulomb' }, { target, angles: { from: 0, to: 180, count: 19 } });
    const masses = { alpha: 3727.3794118, carbon: 12 * 931.49410372 - 6 * 0.51099895069 };
    for (const { ways } of kinematicsOf(body).rows) {
      const [way] = ways;
      if (!way || way.recoilEnergy === null || way.recoilAngle === null) throw new Error('no way');
      expectRelative(way.projectileEnergy + way.recoilEnergy, 1, 1e-14);
      const p1 = Math.sqrt(2 * masses.alpha * way.projectileEnergy);
      const p2 = Math.sqrt(2 * masses.carbon * way.recoilEnergy);
      const rad = Math.PI / 180;
      const along = p1 * Math.cos(way.thetaLab * rad) + p2 * Math.cos(way.recoilAngle * rad);
      const across = p1 * Math.sin(way.thetaLab * rad) - p2 * Math.sin(way.recoilAngle * rad);
      expectRelative(along, Math.sqrt(2 * masses.alpha), 1e-6);
      expect(Math.abs(across)).toBeLessThan(1e-6 * Math.sqrt(2 * masses.alpha));
    }
  });

  test('a fixed centre takes nothing and does not move', () => {
    const [row] = kinematicsOf(CONTRACT_BODY).rows;
    expect(row?.ways[0]).toMatchObject({ kept: 1, recoilAngle: null, recoilEnergy: null });
  });
});

test('what was not asked for is not answered', () => {
  expect(answer(CONTRACT_BODY)).not.toHaveProperty('aids');
  expect(answer({ ...CONTRACT_BODY, aids: {} }).aids).toEqual({});
});
