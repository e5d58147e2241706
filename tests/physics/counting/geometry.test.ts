import { describe, expect, test } from 'vitest';
import { acceptanceAverage } from '#server/physics/counting/acceptance.ts';
import type { RingWeight } from '#server/physics/counting/acceptance.ts';
import {
  halfAngleOfCone,
  halfAngleOfDisc,
  halfAzimuth,
  ringsOf,
  solidAngleOfCone,
} from '#server/physics/counting/cone.ts';
import type { Cone } from '#server/physics/counting/cone.ts';
import type { Curve } from '#server/physics/counting/curve.ts';
import {
  exitCosine,
  meanTransmission,
  slabWeight,
  transmissionAt,
} from '#server/physics/counting/slab.ts';
import type { Slab } from '#server/physics/counting/slab.ts';
import { generator } from '#server/physics/counting/statistics/generator.ts';
import { cmToLab, labToCm } from '#server/physics/kinematics/frames.ts';
import { twoBody } from '#server/physics/kinematics/two-body.ts';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import { refusal } from '#tests/physics/tables/refusal.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';

const DEGREE = Math.PI / 180;
const FIXED = {
  rho: 0,
  rhoMinusOne: -1,
  gamma: 1,
  thetaMax: Math.PI,
  keptHeadOn: 1,
  lostHeadOn: 0,
};

/** A cross section of the centre of mass in a frame. */
function curve(cm: (theta: number) => number, frame = FIXED): Curve {
  const dcs = (theta: number) => ({ value: cm(theta), error: 0 });
  return {
    frame,
    forwardDiverges: false,
    backwardDiverges: false,
    cm: dcs,
    lab: (theta) => {
      const ways = labToCm(theta, frame);
      const value = ways.reduce((sum, way) => sum + cm(way.thetaCm) * way.jacobian, 0);
      return ways.length === 0
        ? { dcs: null, reason: 'out of reach', isOutOfReach: true }
        : { dcs: { value, error: 0 }, reason: null, isOutOfReach: false };
    },
  };
}
const rutherford = curve((theta) => Math.sin(theta / 2) ** -4);

/** Directions thrown evenly into a cone; mean and standard error of f(theta, psi). */
function thrown(
  { theta, halfAngle }: Cone,
  f: (theta: number, psi: number) => number,
  trials = 200_000,
) {
  const { uniform } = generator(20);
  let sum = 0;
  let square = 0;
  for (let i = 0; i < trials; i++) {
    const cos = 1 - uniform() * (1 - Math.cos(halfAngle));
    const sin = Math.sqrt(1 - cos * cos);
    const phi = 2 * Math.PI * uniform();
    const x = sin * Math.cos(phi) * Math.cos(theta) + cos * Math.sin(theta);
    const z = cos * Math.cos(theta) - sin * Math.cos(phi) * Math.sin(theta);
    const value = f(Math.acos(Math.min(1, Math.max(-1, z))), Math.atan2(sin * Math.sin(phi), x));
    sum += value;
    square += value * value;
  }
  const mean = sum / trials;
  return { mean, error: Math.sqrt((square / trials - mean * mean) / trials) };
}

describe('solid angles', () => {
  test('a disc of 5 at 100: 7.8392860e-3 sr, one of 25: 0.1876002 (πr²/d² gives 7.8539816e-3, 0.1963495)', () => {
    expectRelative(solidAngleOfCone(halfAngleOfDisc(5, 100)), 7.839286e-3, 2e-8);
    expectRelative(solidAngleOfCone(halfAngleOfDisc(25, 100)), 0.1876002, 3e-7);
    expectRelative(solidAngleOfCone(halfAngleOfDisc(1e-6, 1)), Math.PI * 1e-12, 1e-11);
  });

  test('half angle and solid angle undo one another, up to the whole sphere', () => {
    for (const omega of [1e-12, 1e-3, 1, 2 * Math.PI, 4 * Math.PI]) {
      expectRelative(solidAngleOfCone(halfAngleOfCone(omega)), omega, 1e-14);
    }
    expect(refusal(() => halfAngleOfCone(13))).toMatch(/4π/);
    expect(refusal(() => halfAngleOfCone(0))).toMatch(/above 0/);
  });

  test('the azimuths of the rings add up to the solid angle', () => {
    for (const [theta, halfAngle] of [
      [30, 5],
      [3, 10],
      [170, 25],
      [90, 100],
      [40, 175],
    ] as const) {
      const cone = { theta: theta * DEGREE, halfAngle: halfAngle * DEGREE };
      const { whole, cut } = ringsOf(cone);
      const rings = whole.reduce(
        (sum, [a, b]) => sum + 2 * Math.PI * (Math.cos(a) - Math.cos(b)),
        0,
      );
      const [a, b] = cut ?? [0, 0];
      const arcs = integrate((x) => 2 * halfAzimuth(x, cone) * Math.sin(x), a, b, {
        relative: 1e-9,
      });
      expectRelative(rings + arcs.value, solidAngleOfCone(cone.halfAngle), 1e-7);
    }
  });
});

describe('averages over an acceptance', () => {
  test.each([
    [10, 1, 1.02028],
    [10, 2, 1.08496],
    [10, 3, 1.20731],
    [90, 5, 1.00574],
  ])(
    'sin⁻⁴(θ/2) at %i° with a half angle of %i°: %d of the central value',
    (at, half, expected) => {
      const cone = { theta: at * DEGREE, halfAngle: half * DEGREE };
      const found = acceptanceAverage(rutherford, cone);
      const central = Math.sin(cone.theta / 2) ** -4;
      expectRelative((found?.value ?? NaN) / central, expected, 5e-6);
      expect((found?.error ?? NaN) / (found?.value ?? NaN)).toBeLessThan(1e-6);
    },
  );

  test.each([
    [25, 8],
    [60, 20],
    [150, 28],
    [4, 12],
    [176, 9],
    [100, 120],
  ])('agree with directions thrown at random, %i° with %i°', (at, half) => {
    const cone = { theta: at * DEGREE, halfAngle: half * DEGREE };
    const soft = (theta: number) => (Math.sin(theta / 2) ** 2 + 0.01) ** -2;
    const found = acceptanceAverage(curve(soft), cone);
    const { mean, error } = thrown(cone, soft);
    expect(Math.abs((found?.value ?? NaN) - mean)).toBeLessThan(4 * error);
    expect(found?.error).toBeLessThan(error / 10);
  });

  test('what is even is not changed, and a narrow cone sees its ray', () => {
    const even = acceptanceAverage(
      curve(() => 3),
      { theta: 1, halfAngle: 0.7 },
    );
    expectRelative(even?.value ?? NaN, 3, 1e-9);
    const ray = acceptanceAverage(rutherford, { theta: 1, halfAngle: 1e-10 });
    expectRelative(ray?.value ?? NaN, Math.sin(0.5) ** -4, 1e-14);
  });

  const alphaOnProton = twoBody({
    projectileMass: 3727.3794118e6,
    targetMass: 938.27208943e6,
    energy: 5e6,
    regime: 'nonrelativistic',
  }).frame;

  test.each([
    [8, 3],
    [13, 4],
    [0, 30],
    [14, 0.9],
  ])(
    'a heavy projectile: both branches, across the edge of its cone (14.58°), %i° with %d°',
    (at, half) => {
      const cone = { theta: at * DEGREE, halfAngle: half * DEGREE };
      const cm = (theta: number) => 1 + Math.cos(theta) ** 2;
      const found = acceptanceAverage(curve(cm, alphaOnProton), cone);
      // The other way round: directions of the centre of mass thrown, those counted whose lab direction enters.
      const { uniform } = generator(31);
      let hits = 0;
      let square = 0;
      const trials = 400_000;
      for (let i = 0; i < trials; i++) {
        const theta = Math.acos(1 - 2 * uniform());
        const phi = 2 * Math.PI * uniform();
        const { thetaLab } = cmToLab(theta, alphaOnProton);
        const cos =
          Math.cos(thetaLab) * Math.cos(cone.theta) +
          Math.sin(thetaLab) * Math.cos(phi) * Math.sin(cone.theta);
        const value = cos >= Math.cos(cone.halfAngle) ? cm(theta) : 0;
        hits += value;
        square += value * value;
      }
      const mean = hits / trials;
      const scale = (4 * Math.PI) / solidAngleOfCone(cone.halfAngle);
      const error = Math.sqrt((square / trials - mean * mean) / trials) * scale;
      expect(Math.abs((found?.value ?? NaN) - mean * scale)).toBeLessThan(4 * error);
      expect(found?.error).toBeLessThan(error / 10);
    },
  );

  test('the whole sphere holds everything, whatever the frame', () => {
    const cm = (theta: number) => 1 + Math.cos(theta) ** 2;
    const sphere = { theta: 0.4, halfAngle: Math.PI };
    for (const frame of [FIXED, alphaOnProton]) {
      const found = acceptanceAverage(curve(cm, frame), sphere);
      expectRelative((found?.value ?? NaN) * 4 * Math.PI, (16 * Math.PI) / 3, 1e-7);
    }
  });

  test('nothing arrives outside the cone, and a divergence inside is no number', () => {
    const outside = acceptanceAverage(
      curve(() => 1, alphaOnProton),
      { theta: 1, halfAngle: 0.1 },
    );
    expect(outside?.value).toBe(0);
    const bare = { ...rutherford, forwardDiverges: true };
    expect(acceptanceAverage(bare, { theta: 0.05, halfAngle: 0.1 })).toBeNull();
    expect(acceptanceAverage(bare, { theta: 0.2, halfAngle: 0.1 })?.value).toBeGreaterThan(1);
  });
});

describe('what is lost in the target', () => {
  const slab = (changes: Partial<Slab>): Slab => ({
    kind: 'foil',
    collisions: 0.4,
    tilt: 0,
    ...changes,
  });

  test.each([
    [0.3, 0.9],
    [0.7, -0.4],
    [0, 1],
    [-0.6, 0.05],
  ])('the mean over the depth is the integral over the depth: tilt %d, exit %d', (tilt, cosine) => {
    const foil = slab({ tilt });
    const mean = integrate((u) => transmissionAt(foil, u, cosine), 0, 1, { relative: 1e-13 }).value;
    expectRelative(meanTransmission(foil, cosine), mean, 1e-12);
  });

  test('along the plane nothing leaves, an empty target loses nothing', () => {
    expect(meanTransmission(slab({}), 0)).toBe(0);
    expect(meanTransmission(slab({ collisions: 0 }), 0)).toBe(1);
    expect(slabWeight(slab({ collisions: 0 }), null)).toBeNull();
  });

  test('a thin target loses half of the way in and half of the way out', () => {
    const foil = slab({ collisions: 1e-4, tilt: 0.5 });
    const lost = 1 - meanTransmission(foil, 0.8);
    expectRelative(lost, 0.5e-4 * (1 / Math.cos(0.5) + 1 / 0.8), 1e-3);
  });

  test('the gas: the mean over the depth with half of the length on the way out', () => {
    const gas = slab({ kind: 'gas' });
    const mean = integrate((u) => transmissionAt(gas, u, 0.1), 0, 1, { relative: 1e-13 }).value;
    expectRelative(meanTransmission(gas, 0.1), mean, 1e-12);
  });

  test('a tilted foil and a wide detector: directions and depths thrown at random', () => {
    const cone = { theta: 50 * DEGREE, halfAngle: 25 * DEGREE };
    const foil = slab({ collisions: 0.8, tilt: 35 * DEGREE });
    const weight: RingWeight = slabWeight(foil, null) ?? (() => NaN);
    const soft = (theta: number) => 1 / (Math.sin(theta / 2) ** 2 + 0.1);
    const found = acceptanceAverage(curve(soft), cone, weight);
    const depths = generator(5);
    const { mean, error } = thrown(cone, (theta, psi) => {
      const u = depths.uniform();
      const direction = exitCosine(theta, psi, foil.tilt);
      const way = direction > 0 ? 1 - u : u;
      const path = u / Math.cos(foil.tilt) + way / Math.abs(direction);
      return soft(theta) * Math.exp(-foil.collisions * path);
    });
    expect(Math.abs((found?.weighted ?? NaN) - mean)).toBeLessThan(4 * error);
  });

  test('tilting towards a detector shortens its way out', () => {
    expectRelative(exitCosine(1, 0, 1), 1, 1e-14);
    expectRelative(exitCosine(1, 0, 0.4), Math.cos(0.6), 1e-14);
    expectRelative(exitCosine(1, Math.PI, 0.4), Math.cos(1.4), 1e-14);
  });
});
