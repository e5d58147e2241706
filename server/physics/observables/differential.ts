import type { Amplitude, ScatteringAmplitude } from '#server/physics/methods/amplitude.ts';
import type { AngularFactor } from '#server/physics/methods/lepton-spin.ts';
import { exchangeDcs } from '#server/physics/methods/exchange.ts';
import type { Frame } from '#server/physics/kinematics/frames.ts';
import { labToCm } from '#server/physics/kinematics/frames.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { DomainError } from '#shared/errors.ts';

export interface DifferentialInput {
  born: ScatteringAmplitude;
  k: number;
  /** Spin of identical particles; null for distinct ones. */
  exchangeSpin: number | null;
  /** What stands after the square of the amplitude: the spin of a lepton; null without one. */
  factor?: AngularFactor | null;
  /** Incoherent scattering, angstrom²/sr. */
  incoherent?: number;
  /** Spin-flip amplitude, angstrom; null without a spin-orbit term. */
  flip?: ((q: number) => Amplitude) | null;
}

/** The curve of a method in the frame it is asked in. */
export type Curve = { frame: 'cm'; points: CmPoint[] } | { frame: 'lab'; points: LabPoint[] };

/** Cross section at one centre-of-mass angle; lengths in angstrom. */
export interface CmPoint {
  thetaCm: number;
  q: number;
  /** The direct amplitude; null where it diverges. */
  amplitude: Amplitude | null;
  /** angstrom²/sr, with a bound of its error; null where it diverges. */
  dcs: { value: number; error: number; belowFloor: boolean } | null;
  /** Of a fully polarised beam, with a spin-orbit term only. */
  analysingPower?: number;
}

/** Cross section at one lab angle: none, one or two ways to get there. */
export interface LabPoint {
  branches: CmPoint[];
  /** Why there is no cross section at all; null where there is one. */
  reason: string | null;
}

export const FORWARD_DIVERGENCE =
  'The cross section of a 1/r potential diverges in the forward direction.';
const EXCHANGED_DIVERGENCE =
  'The exchanged amplitude of a 1/r potential diverges where the partner goes forward.';
/** Angles and the edge of a cone are known to a few roundings. */
const ANGLE_ROUNDING = 8 * UNIT_ROUNDOFF;
/** Of an angle as it was typed: the factor of its unit, the product, halving and cosine. */
const TYPED_ANGLE_ROUNDING = 4 * UNIT_ROUNDOFF;
const PROBE = 2 ** -24;

/** An amplitude that is neither good to 1e-6 nor lost in the floor is refused: no silent wrong number. */
function refuseCoarse(amplitude: Amplitude, floor: number): void {
  const size = Math.hypot(amplitude.re, amplitude.im);
  if (amplitude.error <= Math.max(1e-6 * size, floor)) return;
  throw new DomainError(
    'tooMuchWork',
    'The amplitude cannot be computed to a millionth of itself: the product of wave number and range is too large for double precision. Lower the energy or the range, or check their units.',
  );
}

export function reasonAt({ amplitude }: CmPoint): string {
  return amplitude === null ? FORWARD_DIVERGENCE : EXCHANGED_DIVERGENCE;
}

/** Spin factor and incoherent part, in this order: they belong to the cross section, not to the amplitude. */
function after(
  { factor, incoherent = 0 }: DifferentialInput,
  { value, error, belowFloor }: NonNullable<CmPoint['dcs']>,
  thetaCm: number,
  blur: number,
): NonNullable<CmPoint['dcs']> {
  const spin = factor ? factor(thetaCm, blur) : { value: 1, error: 0 };
  const carried = error * (spin.value + spin.error) + value * spin.error;
  const whole = value * spin.value + incoherent;
  return {
    value: whole,
    error: carried + 4 * UNIT_ROUNDOFF * incoherent,
    belowFloor: belowFloor && incoherent === 0,
  };
}

/**
 * f at pi - theta, where the partner goes. Near pi its q is what is left of a cosine, and the last digit of the angle counts
 * tan(theta/2) times as much as it does in q itself.
 */
function exchangedAmplitude(
  { born, k }: DifferentialInput,
  thetaCm: number,
  angleError: number,
): Amplitude | null {
  // At pi the partner goes forward: exactly 0, not the rounding of a cosine.
  if (thetaCm === Math.PI) return born.amplitude(0);
  const error = angleError + TYPED_ANGLE_ROUNDING * thetaCm;
  return born.amplitude(2 * k * Math.cos(thetaCm / 2), (error / 2) * Math.tan(thetaCm / 2));
}

/**
 * With a spin-orbit term: dσ/dΩ = |f|² + |g|² of an unpolarised beam, and A = 2 Im(f g*)/(|f|² + |g|²) of a polarised one, for the
 * amplitude f + i g σ·n with n along k × k' (Madison convention).
 */
function polarised(
  f: Amplitude,
  g: Amplitude,
  { thetaCm, q, floor }: { thetaCm: number; q: number; floor: number },
): CmPoint {
  const value = f.re * f.re + f.im * f.im + g.re * g.re + g.im * g.im;
  const size = Math.sqrt(value);
  const blur = f.error + g.error;
  const error = (2 * size + blur) * blur + 5 * UNIT_ROUNDOFF * value;
  const analysingPower = value > 0 ? (2 * (f.im * g.re - f.re * g.im)) / value : 0;
  const dcs = { value, error, belowFloor: size <= floor };
  return { thetaCm, q, amplitude: f, dcs, analysingPower };
}

/**
 * dσ/dΩ at one angle of the centre of mass.
 *
 * Formula: |f(q)|², q = 2k sin(theta/2), times the factor of a lepton's spin, plus what is incoherent; for identical particles with the
 * exchanged amplitude at 2k cos(theta/2).
 *
 * @param thetaCm rad, 0 to pi
 * @param angleError of thetaCm beyond that of a typed angle, rad
 * @returns angstrom²/sr with a bound of its error, or null where a Coulomb tail diverges
 * @throws DomainError('tooMuchWork') where the amplitude is neither good to 1e-6 nor below the floor
 */
export function cmPoint(input: DifferentialInput, thetaCm: number, angleError = 0): CmPoint {
  const { born, k, exchangeSpin } = input;
  const q = 2 * k * Math.sin(thetaCm / 2);
  const blur = thetaCm > 0 ? Math.abs(angleError / (2 * Math.tan(thetaCm / 2))) : 0;
  const amplitude = born.amplitude(q, blur);
  if (amplitude === null) return { thetaCm, q, amplitude, dcs: null };
  refuseCoarse(amplitude, born.floor);
  if (input.flip) return polarised(amplitude, input.flip(q), { thetaCm, q, floor: born.floor });
  if (exchangeSpin === null) {
    const size = Math.hypot(amplitude.re, amplitude.im);
    const value = amplitude.re * amplitude.re + amplitude.im * amplitude.im;
    const error = (2 * size + amplitude.error) * amplitude.error + 3 * UNIT_ROUNDOFF * value;
    const belowFloor = size <= born.floor;
    return {
      thetaCm,
      q,
      amplitude,
      dcs: after(input, { value, error, belowFloor }, thetaCm, blur),
    };
  }
  const exchanged = exchangedAmplitude(input, thetaCm, angleError);
  if (exchanged === null) return { thetaCm, q, amplitude, dcs: null };
  refuseCoarse(exchanged, born.floor);
  const { value, error } = exchangeDcs(amplitude, exchanged, exchangeSpin);
  return { thetaCm, q, amplitude, dcs: { value, error, belowFloor: value <= born.floor ** 2 } };
}

/** The frame of masses that differ by a little less. */
function otherMasses(frame: Frame): Frame {
  const rhoMinusOne = frame.rhoMinusOne * (1 - PROBE);
  if (!(rhoMinusOne > 0)) return { ...frame, rhoMinusOne };
  const cone = Math.atan2(Math.tan(frame.thetaMax), Math.sqrt(1 - PROBE));
  return { ...frame, rhoMinusOne, thetaMax: cone };
}

/** What the last digits of two masses are of their difference; equal masses are equal. */
const massRounding = ({ rho, rhoMinusOne }: Frame): number =>
  rhoMinusOne === 0 ? 0 : 4 * UNIT_ROUNDOFF * ((rho + 1) / Math.abs(rhoMinusOne));

/**
 * dσ/dΩ at one lab angle, branch by branch.
 *
 * Formula: dσ/dΩ_lab = dσ/dΩ_cm · dΩ_cm/dΩ_lab for each centre-of-mass angle that leads there.
 *
 * @param thetaLab rad, 0 to pi
 * @returns branches, forward one first, each with q and amplitude of the centre of mass and the cross section of the lab;
 *   none, with the reason, where the projectile cannot go
 */
export function labPoint(input: DifferentialInput, frame: Frame, thetaLab: number): LabPoint {
  const found = labToCm(thetaLab, frame);
  if (found.length === 0) return { branches: [], reason: outsideCone(frame) };
  const shifts = [
    { ways: labToCm(thetaLab * (1 - PROBE), frame), rounding: ANGLE_ROUNDING },
    { ways: labToCm(thetaLab, otherMasses(frame)), rounding: massRounding(frame) },
  ];
  const branches = found.map(({ thetaCm, jacobian }, i) => {
    let angleError = 4 * UNIT_ROUNDOFF * thetaCm;
    let stretch = 0;
    for (const { ways, rounding } of shifts) {
      const near = ways[i] ?? { thetaCm, jacobian };
      angleError += (Math.abs(thetaCm - near.thetaCm) / PROBE) * rounding;
      stretch += (Math.abs(1 - near.jacobian / jacobian) / PROBE) * rounding;
    }
    const point = cmPoint(input, thetaCm, angleError);
    const { dcs } = point;
    if (dcs === null) return point;
    const value = dcs.value * jacobian;
    const relative = Number.isFinite(stretch) ? stretch + 8 * UNIT_ROUNDOFF : 8 * UNIT_ROUNDOFF;
    return { ...point, dcs: { ...dcs, value, error: dcs.error * jacobian + value * relative } };
  });
  return { branches, reason: null };
}

function outsideCone({ rhoMinusOne, thetaMax }: Frame): string {
  if (rhoMinusOne === 0) {
    return 'A particle that meets one of its own mass is never scattered to 90 degrees or beyond in the lab.';
  }
  const degrees = (thetaMax * 180) / Math.PI;
  return `The projectile is heavier than its target and never leaves a cone of ${degrees.toPrecision(6)} degrees in the lab; on its edge the cross section diverges.`;
}

/** dσ/dΩ at every angle, in the frame it is asked in. */
export function curveOf(
  input: DifferentialInput,
  angles: readonly number[],
  frame: 'cm' | 'lab',
  between: Frame,
): Curve {
  if (frame === 'cm') return { frame, points: angles.map((theta) => cmPoint(input, theta)) };
  return { frame, points: angles.map((theta) => labPoint(input, between, theta)) };
}
