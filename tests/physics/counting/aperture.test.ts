import { describe, expect, test } from 'vitest';
import { acceptanceAverage } from '#server/physics/counting/acceptance.ts';
import {
  azimuthsOf,
  kinksOf,
  rayOf,
  solidAngleOfShape,
} from '#server/physics/counting/aperture.ts';
import type { Shape } from '#server/physics/counting/aperture.ts';
import { halfAngleOfCone, solidAngleOfCone } from '#server/physics/counting/cone.ts';
import type { Cone } from '#server/physics/counting/cone.ts';
import type { Curve } from '#server/physics/counting/curve.ts';
import { exitCosine, meanTransmission, slabWeight } from '#server/physics/counting/slab.ts';
import { generator } from '#server/physics/counting/statistics/generator.ts';
import { integrate } from '#server/physics/numerics/quadrature.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { Q, SAID, faultsOf, only, plan, thinPlan } from './plans.ts';

const DEGREE = Math.PI / 180;
const soft = (theta: number) => (Math.sin(theta / 2) ** 2 + 0.02) ** -2;
const curve: Curve = {
  frame: { rho: 0, rhoMinusOne: -1, gamma: 1, thetaMax: Math.PI, keptHeadOn: 1, lostHeadOn: 0 },
  forwardDiverges: false,
  backwardDiverges: false,
  cm: (theta) => ({ value: soft(theta), error: 0 }),
  lab: (theta) => ({ dcs: { value: soft(theta), error: 0 }, reason: null, isOutOfReach: false }),
};
const coneOf = (degrees: number, shape: Shape): Cone => ({
  theta: degrees * DEGREE,
  halfAngle: halfAngleOfCone(solidAngleOfShape(shape)),
  shape,
});
const rectangle = (halfWidth: number, halfHeight: number): Shape => ({
  kind: 'rectangle',
  halfWidth,
  halfHeight,
});
const annulus = (inner: number, outer: number): Shape => ({
  kind: 'annulus',
  inner: inner * DEGREE,
  outer: outer * DEGREE,
});

/** Directions thrown over the sphere; the mean of f over those that enter, with its standard error, and their share of the sphere. */
function thrown({ theta, shape }: Cone, f: (theta: number, psi: number) => number) {
  const { uniform } = generator(77);
  const trials = 600_000;
  let [hits, sum, square] = [0, 0, 0];
  for (let i = 0; i < trials; i++) {
    const cos = 1 - 2 * uniform();
    const sin = Math.sqrt(1 - cos * cos);
    const phi = 2 * Math.PI * uniform();
    // Along the axis, in the plane of beam and detector, and across it.
    const x = sin * Math.cos(phi);
    const y = sin * Math.sin(phi);
    const along = x * Math.sin(theta) + cos * Math.cos(theta);
    const aside = x * Math.cos(theta) - cos * Math.sin(theta);
    const inside =
      shape?.kind === 'rectangle'
        ? along > 0 &&
          Math.abs(aside / along) <= shape.halfWidth &&
          Math.abs(y / along) <= shape.halfHeight
        : along <= Math.cos(shape?.inner ?? 0) && along >= Math.cos(shape?.outer ?? 0);
    if (!inside) continue;
    const value = f(Math.acos(cos), phi);
    hits += 1;
    sum += value;
    square += value * value;
  }
  const mean = sum / hits;
  return { mean, error: Math.sqrt((square / hits - mean * mean) / hits), share: hits / trials };
}

const cones = [
  coneOf(40, rectangle(0.2, 0.5)),
  coneOf(40, rectangle(0.6, 0.2)),
  coneOf(5, rectangle(0.3, 0.4)),
  coneOf(12, rectangle(0.15, 0.9)),
  coneOf(90, rectangle(0.5, 0.5)),
  coneOf(100, rectangle(2, 3)),
  coneOf(175, rectangle(0.3, 0.2)),
  coneOf(140, rectangle(0.2, 0.7)),
  coneOf(0, rectangle(0.4, 0.3)),
  coneOf(0, annulus(10, 30)),
  coneOf(180, annulus(10, 30)),
  coneOf(8, annulus(12, 25)),
  coneOf(20, annulus(12, 25)),
  coneOf(60, annulus(5, 25)),
  coneOf(165, annulus(5, 25)),
];

describe('apertures', () => {
  test.each(cones)('%o: the mean of directions thrown at random', (cone) => {
    const found = acceptanceAverage(curve, cone);
    const { mean, error, share } = thrown(cone, soft);
    expect(Math.abs((found?.value ?? NaN) - mean)).toBeLessThan(4.5 * error);
    expect(found?.error).toBeLessThan(error / 10);
    const solidAngle = solidAngleOfCone(cone.halfAngle);
    expectRelative(share * 4 * Math.PI, solidAngle, 0.03);
  });

  test.each(cones)('%o: the azimuths of its rings add up to its solid angle', (cone) => {
    const width = (theta: number) =>
      azimuthsOf(theta, cone).reduce((sum, [from, to]) => sum + 2 * (to - from), 0);
    const edges = kinksOf(cone);
    const [low = 0] = edges;
    const all = integrate((x) => width(x) * Math.sin(x), low, edges.at(-1) ?? low, {
      breakpoints: edges,
      relative: 1e-10,
    });
    expectRelative(all.value, solidAngleOfCone(cone.halfAngle), 1e-8);
    const high = edges.at(-1) ?? 0;
    if (low > 0) expect(width(low - 1e-6)).toBe(0);
    if (high < Math.PI) expect(width(high + 1e-6)).toBe(0);
  });

  test('a square of 10 at 100 and the whole sky', () => {
    expectRelative(solidAngleOfShape(rectangle(0.05, 0.05)), 0.01, 6e-3);
    expectRelative(solidAngleOfShape(rectangle(1e9, 1e9)), 2 * Math.PI, 1e-8);
    expectRelative(solidAngleOfShape(annulus(0, 180)), 4 * Math.PI, 1e-14);
  });

  test('a ring without a hole is the circular cone', () => {
    const ring = acceptanceAverage(curve, coneOf(30, annulus(0, 8)));
    const cone = acceptanceAverage(curve, { theta: 30 * DEGREE, halfAngle: 8 * DEGREE });
    expectRelative(ring?.value ?? NaN, cone?.value ?? NaN, 1e-7);
  });

  test('a tilted foil weighs every direction by its own way out', () => {
    const cone = coneOf(45, rectangle(0.5, 0.3));
    const foil = { kind: 'foil' as const, collisions: 0.7, tilt: -0.5 };
    const found = acceptanceAverage(curve, cone, slabWeight(foil, null));
    const { mean, error } = thrown(
      cone,
      (theta, psi) => soft(theta) * meanTransmission(foil, exitCosine(theta, psi, foil.tilt)),
    );
    expect(Math.abs((found?.weighted ?? NaN) - mean)).toBeLessThan(4.5 * error);
  });

  test('a divergence through the hole of a ring is no divergence', () => {
    const bare = { ...curve, forwardDiverges: true };
    expect(acceptanceAverage(bare, coneOf(0, annulus(2, 5)))).not.toBeNull();
    expect(acceptanceAverage(bare, coneOf(3, annulus(2, 5)))).toBeNull();
    expect(acceptanceAverage(bare, coneOf(3, rectangle(0.1, 0.1)))).toBeNull();
    expect(acceptanceAverage(bare, coneOf(30, rectangle(0.1, 0.1)))).not.toBeNull();
    expectRelative(rayOf(coneOf(0, annulus(2, 5))), 3.5 * DEGREE, 1e-14);
  });
});

describe('apertures in a plan', () => {
  const at = (detector: object) => ({
    ...thinPlan(),
    detectors: [{ name: 'D', angle: 40, distance: Q(100, 'mm'), ...SAID, ...detector }],
  });

  test('a square, and a ring around the beam', () => {
    const square = only(plan(at({ width: Q(10, 'mm'), height: Q(10, 'mm') })));
    expectRelative(square.solidAngle, solidAngleOfShape(rectangle(0.05, 0.05)), 1e-14);
    const disc = only(plan(at({ apertureRadius: Q(10 / Math.sqrt(Math.PI), 'mm') })));
    expectRelative(square.trueRate.value, disc.trueRate.value, 2e-2);
    const ring = only(
      plan(at({ angle: 0, innerRadius: Q(20, 'mm'), apertureRadius: Q(40, 'mm') })),
    );
    expect(ring.solidAngle).toBeGreaterThan(0.3);
    expect(ring.trueRate.value).toBeGreaterThan(disc.trueRate.value);
  });

  test.each([
    [{ width: Q(10, 'mm') }, '/detectors/0/height'],
    [{ width: Q(1, 'mm'), height: Q(1, 'mm'), apertureRadius: Q(1, 'mm') }, '/detectors/0/width'],
    [{ innerRadius: Q(5, 'mm'), apertureRadius: Q(4, 'mm') }, '/detectors/0/innerRadius'],
    [{ innerRadius: Q(5, 'mm') }, '/detectors/0/apertureRadius'],
    [{ width: Q(1, 'mm'), height: Q(1, 'mm'), solidAngle: 0.1 }, '/detectors/0/solidAngle'],
  ])('refuses %o', (detector, path) => {
    expect(faultsOf(at(detector)).map((fault) => fault.path)).toEqual([path]);
  });
});
