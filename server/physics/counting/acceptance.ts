import { cmToLab } from '#server/physics/kinematics/frames.ts';
import type { GaussOrder } from '#server/physics/numerics/gauss-rule.ts';
import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import { cmRanges } from '#server/physics/observables/between-angles.ts';
import type { Azimuths } from './aperture.ts';
import { azimuthsOf, kinksOf, rayOf } from './aperture.ts';
import type { Cone } from './cone.ts';
import { halfAzimuth, ringsOf, solidAngleOfCone } from './cone.ts';
import type { Curve, Dcs } from './curve.ts';

/**
 * What a direction is worth, 0 to 1: the mean over the azimuths between two, counted from the detector's plane, at one polar angle of the lab.
 */
export type RingWeight = (thetaLab: number, from: number, to: number) => number;

/** Relative change of the sum between two refinements that is small enough. */
const AIM = 2e-7;
const FIRST = 4;
const MOST = 2048;
/** Panels are halved at most so often: towards a forward peak this is a factor of 4,000. */
const HALVINGS = 12;
/** A single ray: nothing is averaged over less. */
const NARROW = 1e-9;

/** A mean over an acceptance: plain with its error, and with every direction counted by its weight. */
export interface AcceptanceMean extends Dcs {
  weighted: number;
}

const SUMS = ['value', 'weighted', 'error'] as const;

/** A cross section met a divergence inside the acceptance. */
class Divergence extends Error {}

function finite(dcs: Dcs | null): Dcs {
  if (dcs === null) throw new Divergence();
  return dcs;
}

/**
 * ∫ g over [a, b] of a function that vanishes like a square root at the ends, by x = (a + b)/2 - (b - a)/2 cos t and the trapezoidal rule,
 * whose points are used again when their number doubles.
 */
function overArc(g: (x: number) => AcceptanceMean, a: number, b: number): AcceptanceMean {
  const half = (b - a) / 2;
  const middle = a + half;
  const sum: AcceptanceMean = { value: 0, weighted: 0, error: 0 };
  const add = (i: number, n: number) => {
    const t = (Math.PI * i) / n;
    const weight = half * Math.sin(t);
    const at = g(middle - half * Math.cos(t));
    for (const key of SUMS) sum[key] += weight * at[key];
  };
  for (let i = 1; i < FIRST; i++) add(i, FIRST);
  let [plain, weighted] = [sum.value / FIRST, sum.weighted / FIRST];
  for (let n = 2 * FIRST; ; n *= 2) {
    for (let i = 1; i < n; i += 2) add(i, n);
    const change = Math.abs(sum.value / n - plain);
    const other = Math.abs(sum.weighted / n - weighted);
    [plain, weighted] = [sum.value / n, sum.weighted / n];
    const isSteady = change <= AIM * plain && other <= AIM * weighted;
    if (isSteady || n >= MOST) {
      const step = Math.PI / n;
      const error = step * sum.error + Math.PI * change;
      return { value: step * sum.value, weighted: step * sum.weighted, error };
    }
  }
}

/** ∫ g dx by x = (a + b)/2 - (b - a)/2 cos t and Gauss-Legendre sums in t: square roots at the ends are smooth in t. */
function gaussArc(g: Ring, a: number, b: number, order: GaussOrder): AcceptanceMean {
  const { nodes, weights } = gaussRule(order);
  const half = (b - a) / 2;
  const sum: AcceptanceMean = { value: 0, weighted: 0, error: 0 };
  nodes.forEach((node, i) => {
    const t = (Math.PI / 2) * (1 + node);
    const weight = (Math.PI / 2) * (weights[i] ?? 0) * half * Math.sin(t);
    const at = g(a + half - half * Math.cos(t));
    for (const key of SUMS) sum[key] += weight * at[key];
  });
  return sum;
}

/** ∫ g over a stretch without kinks inside, by rising orders and then by halves. */
function overPanel(g: Ring, a: number, b: number, halvings = HALVINGS): AcceptanceMean {
  let coarse = gaussArc(g, a, b, 8);
  for (const order of [16, 64] as const) {
    const fine = gaussArc(g, a, b, order);
    const change = Math.abs(fine.value - coarse.value);
    const other = Math.abs(fine.weighted - coarse.weighted);
    const isSteady = change <= AIM * fine.value && other <= AIM * fine.weighted;
    coarse = { ...fine, error: fine.error + change };
    if (isSteady) return coarse;
  }
  if (halvings === 0) return coarse;
  const middle = (a + b) / 2;
  const [low, high] = [
    overPanel(g, a, middle, halvings - 1),
    overPanel(g, middle, b, halvings - 1),
  ];
  return {
    value: low.value + high.value,
    weighted: low.weighted + high.weighted,
    error: low.error + high.error,
  };
}

type Ring = (thetaCm: number) => AcceptanceMean;

/** Directions of one polar angle of the centre of mass that enter, with their cross section and weight. */
function ringOf(
  curve: Curve,
  weight: RingWeight | null,
  azimuths: (thetaLab: number) => Azimuths,
): Ring {
  return (thetaCm) => {
    const { thetaLab } = cmToLab(thetaCm, curve.frame);
    const inside = azimuths(thetaLab);
    if (inside.length === 0) return { value: 0, weighted: 0, error: 0 };
    const { value, error } = finite(curve.cm(thetaCm));
    let width = 0;
    let worth = 0;
    for (const [from, to] of inside) {
      width += to - from;
      worth += (to - from) * (weight === null ? 1 : weight(thetaLab, from, to));
    }
    const size = 2 * Math.sin(thetaCm);
    return {
      value: size * width * value,
      weighted: size * worth * value,
      error: size * width * error,
    };
  };
}

const WHOLE: Azimuths = [[0, Math.PI]];

/** A sum over ranges of the lab, each turned into those of the centre of mass. */
function sumOver(
  curve: Curve,
  ranges: readonly [number, number][],
  over: (from: number, to: number) => AcceptanceMean,
): AcceptanceMean {
  const total: AcceptanceMean = { value: 0, weighted: 0, error: 0 };
  for (const [low, high] of ranges) {
    for (const { from, to } of cmRanges(low, high, curve.frame)) {
      if (!(to > from)) continue;
      const part = over(from, to);
      for (const key of SUMS) total[key] += part[key];
    }
  }
  return total;
}

function overCone(curve: Curve, cone: Cone, weight: RingWeight | null): AcceptanceMean {
  const { whole, cut } = ringsOf(cone);
  const isAhead = whole.some(([low]) => low === 0);
  const isBehind = whole.some(([, high]) => high >= Math.PI);
  if ((curve.forwardDiverges && isAhead) || (curve.backwardDiverges && isBehind)) {
    throw new Divergence();
  }
  const full = ringOf(curve, weight, () => WHOLE);
  const partial = ringOf(curve, weight, (thetaLab) => {
    const azimuth = halfAzimuth(thetaLab, cone);
    return azimuth > 0 ? [[0, azimuth]] : [];
  });
  const rings = sumOver(curve, whole, (from, to) => overPanel(full, from, to));
  const arcs = sumOver(curve, cut ? [cut] : [], (from, to) => overArc(partial, from, to));
  return {
    value: rings.value + arcs.value,
    weighted: rings.weighted + arcs.weighted,
    error: rings.error + arcs.error,
  };
}

function overShape(curve: Curve, cone: Cone, weight: RingWeight | null): AcceptanceMean {
  const kinks = kinksOf(cone);
  if (curve.forwardDiverges && kinks[0] === 0) throw new Divergence();
  if (curve.backwardDiverges && (kinks.at(-1) ?? 0) >= Math.PI) throw new Divergence();
  const ring = ringOf(curve, weight, (thetaLab) => azimuthsOf(thetaLab, cone));
  const ranges = kinks.slice(1).map((to, i): [number, number] => [kinks[i] ?? to, to]);
  return sumOver(curve, ranges, (from, to) => overPanel(ring, from, to));
}

function alongTheRay(
  curve: Curve,
  theta: number,
  weight: RingWeight | null,
): AcceptanceMean | null {
  const { dcs, isOutOfReach } = curve.lab(theta);
  if (dcs === null) return isOutOfReach ? { value: 0, weighted: 0, error: 0 } : null;
  return { ...dcs, weighted: dcs.value * (weight === null ? 1 : weight(theta, 0, 0)) };
}

/**
 * Mean of dσ/dΩ over an acceptance, both branches of a heavy projectile included.
 *
 * Formula: (1/Ω) ∫ dσ/dΩ_cm · 2ψ(θ_lab(θ)) · w sin θ dθ over the angles of the centre of mass that lead into the cone; ψ is half the azimuth
 * inside it. In this variable the edge of a heavy projectile's cone is no singularity.
 *
 * @param curve of one energy
 * @param cone acceptance in the lab
 * @param weight of a direction, such as the share that leaves the target; null for 1
 * @returns angstrom²/sr with an error: the change of the last refinement (2e-7 of the value is aimed at) and the errors of dσ/dΩ; zero where
 *   no particle can go; null where the cross section diverges inside the acceptance
 *
 * Validity: a point-like spot on the target.
 *
 * Source: definition of the solid angle.
 */
export function acceptanceAverage(
  curve: Curve,
  cone: Cone,
  weight: RingWeight | null = null,
): AcceptanceMean | null {
  if (cone.halfAngle < NARROW) return alongTheRay(curve, rayOf(cone), weight);
  try {
    const over = cone.shape ? overShape : overCone;
    const { value, weighted, error } = over(curve, cone, weight);
    const solidAngle = solidAngleOfCone(cone.halfAngle);
    return {
      value: value / solidAngle,
      weighted: weighted / solidAngle,
      error: error / solidAngle,
    };
  } catch (fault) {
    if (fault instanceof Divergence) return null;
    throw fault;
  }
}
