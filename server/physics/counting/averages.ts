import { acceptanceAverage } from './acceptance.ts';
import { rayOf } from './aperture.ts';
import type { Cone } from './cone.ts';
import type { Curve, CurveAt, Dcs, LabDcs } from './curve.ts';
import type { EnergyNode } from './energies.ts';
import type { Slab } from './slab.ts';
import { slabWeight } from './slab.ts';

export interface Averages {
  /** At the central angle and energy. */
  point: LabDcs;
  /** Over the acceptance at the central energy; null where it diverges inside. */
  acceptance: Dcs | null;
  /** Over acceptance, energies and depth; null as above. */
  averaged: Dcs | null;
  /** Share of the scattered particles that is not lost on the way in and out. */
  attenuation: number;
}

/** Relative change of the energy over which a slope is taken. */
const ENERGY_STEP = 1e-3;
const ANGLE_STEP = (0.05 * Math.PI) / 180;

/** What the next order of an average leaves out, judged by the size of its correction, and never more than that. */
function leftOut(whole: number, plain: number): number {
  const correction = Math.abs(whole - plain);
  return plain === 0 ? correction : Math.min(1, correction / plain) * correction;
}

/**
 * dσ/dΩ as a detector sees it: averaged over its acceptance, the energies of the beam and the depth of the target, and what is lost on the way.
 *
 * Formula: Σ over energies and depths of w <dσ/dΩ>; attenuation = Σ w <T dσ/dΩ>/Σ w <dσ/dΩ> with T the transmission of `slab.ts`.
 *
 * @param curveAt cross section at an energy, eV
 * @param energy central one, eV
 * @param nodes from `energyNodes`
 * @returns angstrom²/sr with an error: that of the acceptance average, and the square of the relative correction by energies for the orders left out
 *
 * Source: definition.
 */
export function averagesOf(
  curveAt: CurveAt,
  energy: number,
  nodes: readonly EnergyNode[],
  slab: Slab,
  cone: Cone,
): Averages {
  const central = curveAt(energy);
  const point = central.lab(rayOf(cone));
  const plain = acceptanceAverage(central, cone, slabWeight(slab, null));
  if (plain === null) return { point, acceptance: null, averaged: null, attenuation: 1 };
  const [only, ...others] = nodes;
  if (others.length === 0 && only?.energy === energy) {
    const attenuation = plain.value > 0 ? plain.weighted / plain.value : 1;
    return { point, acceptance: plain, averaged: plain, attenuation };
  }
  let value = 0;
  let error = 0;
  let weighted = 0;
  for (const { energy: at, weight, depth } of nodes) {
    const mean = acceptanceAverage(curveAt(at), cone, slabWeight(slab, depth));
    if (mean === null) return { point, acceptance: plain, averaged: null, attenuation: 1 };
    value += weight * mean.value;
    error += weight * mean.error;
    weighted += weight * mean.weighted;
  }
  const averaged = { value, error: error + leftOut(value, plain.value) };
  return { point, acceptance: plain, averaged, attenuation: value > 0 ? weighted / value : 1 };
}

function relativeSlope(
  mean: (x: number) => number | null,
  x: number,
  step: number,
  here: number,
): number | null {
  const above = mean(x + step);
  const below = mean(x - step);
  if (above === null || below === null || !(here > 0)) return null;
  return (above - below) / (2 * step * here);
}

/** Relative change of the averaged cross section per radian that the detector stands further from the beam; null where there is none. */
export function angleSlope(curve: Curve, cone: Cone): number | null {
  const here = acceptanceAverage(curve, cone);
  const folded = (theta: number) => Math.PI - Math.abs(Math.PI - Math.abs(theta));
  const mean = (theta: number) =>
    acceptanceAverage(curve, { ...cone, theta: folded(theta) })?.value ?? null;
  const step = Math.min(ANGLE_STEP, cone.theta / 4 || ANGLE_STEP);
  return here && relativeSlope(mean, cone.theta, step, here.value);
}

/** d ln <dσ/dΩ>/d ln E at the central energy; null where there is none. */
export function energySlope(curveAt: CurveAt, energy: number, cone: Cone): number | null {
  const here = acceptanceAverage(curveAt(energy), cone);
  const mean = (ratio: number) => acceptanceAverage(curveAt(energy * ratio), cone)?.value ?? null;
  return here && relativeSlope(mean, 1, ENERGY_STEP, here.value);
}

/** Share of what is scattered into a cone that leaves the target, with `times` the collisions planned. */
export function transmittedShare(curve: Curve, cone: Cone, slab: Slab, times: number): number {
  const weight = slabWeight({ ...slab, collisions: slab.collisions * times }, null);
  const mean = acceptanceAverage(curve, cone, weight);
  return mean && mean.value > 0 ? mean.weighted / mean.value : 1;
}

/** d ln T/d ln t of that share. */
export function attenuationSlope(curve: Curve, cone: Cone, slab: Slab): number {
  const at = (times: number) => transmittedShare(curve, cone, slab, times);
  const here = at(1);
  return here > 0 ? (at(1 + ENERGY_STEP) - at(1 - ENERGY_STEP)) / (2 * ENERGY_STEP * here) : 0;
}
