import { gaussRule } from '#server/physics/numerics/gauss-rule.ts';
import type { RingWeight } from './acceptance.ts';

/** What the beam and the scattered particles cross; `collisions` is n t sigma along the normal of a foil, or along a gas. */
export interface Slab {
  kind: 'foil' | 'gas';
  collisions: number;
  /** Of the normal, towards the detector's side of the beam, rad, between -pi/2 and pi/2. */
  tilt: number;
}

const RULE = gaussRule(8);
/** A scattered particle crosses half of a gas target on the average: nothing is said of its walls. */
const HALF = 0.5;
/** Less is lost in the digits of any rate. */
const NOTHING = 1e-12;

/** (1 - e^-x)/x. */
const meanExponential = (x: number): number => (x === 0 ? 1 : -Math.expm1(-x) / x);

/**
 * Cosine between the normal of a slab and a direction; above zero the direction leaves by the far face.
 *
 * @param theta from the beam, rad
 * @param psi azimuth, counted from the plane of beam and detector, in which the slab is tilted, rad
 */
export function exitCosine(theta: number, psi: number, tilt: number): number {
  return Math.cos(theta) * Math.cos(tilt) + Math.sin(theta) * Math.cos(psi) * Math.sin(tilt);
}

const along = (collisions: number, cosine: number): number =>
  collisions === 0 ? 0 : collisions / Math.abs(cosine);

/**
 * Share of the particles that neither collide before nor after they scatter at one depth.
 *
 * Formula: exp(-u a/cos tilt - v a/|c|), with c the cosine of the exit and v = 1 - u by the far face, u by the near one.
 *
 * @param u depth as a share of the thickness, 0 to 1
 * @param cosine of the exit direction to the normal
 */
export function transmissionAt(
  { kind, collisions, tilt }: Slab,
  u: number,
  cosine: number,
): number {
  if (kind === 'gas') return Math.exp(-collisions * (u + HALF));
  const way = cosine > 0 ? 1 - u : u;
  return Math.exp(-u * along(collisions, Math.cos(tilt)) - way * along(collisions, cosine));
}

/**
 * The same averaged over the depth.
 *
 * Formula: far face (e^-b - e^-a)/(a - b), near face (1 - e^-(a+b))/(a + b), with a = n t σ/cos tilt and b = n t σ/|c|.
 *
 * @returns 0 to 1; 0 along the plane of the slab
 *
 * Validity: what has collided once is lost; scattering back into the acceptance is not counted.
 */
export function meanTransmission({ kind, collisions, tilt }: Slab, cosine: number): number {
  if (kind === 'gas') return Math.exp(-collisions * HALF) * meanExponential(collisions);
  const a = along(collisions, Math.cos(tilt));
  const b = along(collisions, cosine);
  if (!(cosine > 0)) return meanExponential(a + b);
  return Math.exp(-Math.min(a, b)) * meanExponential(Math.abs(a - b));
}

/** What directions are worth at one depth, or over all of it (`depth` null); null where nothing is lost. */
export function slabWeight(slab: Slab, depth: number | null): RingWeight | null {
  if (!(slab.collisions > NOTHING)) return null;
  const at = (theta: number, psi: number) => {
    const cosine = exitCosine(theta, psi, slab.tilt);
    return depth === null ? meanTransmission(slab, cosine) : transmissionAt(slab, depth, cosine);
  };
  if (slab.tilt === 0 || slab.kind === 'gas') return (theta) => at(theta, 0);
  return (theta, from, to) => {
    const middle = (from + to) / 2;
    let sum = 0;
    RULE.nodes.forEach((node, i) => {
      sum += ((RULE.weights[i] ?? 0) / 2) * at(theta, middle + ((to - from) / 2) * node);
    });
    return sum;
  };
}
