import { BOHR } from '#server/physics/constants/codata2022.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { xrayFormFactor } from '#server/physics/tables/xray-form-factors.ts';
import { radialQuadrature } from './radial-quadrature.ts';
import { Q_ALLOWANCE } from './transform-error.ts';

/** The tail by closed form and with the form factor from the electron density by quadrature. */
export interface TailRoutes {
  closed: (q: number) => NumericalResult;
  quadrature: (q: number) => NumericalResult;
  /** Where one formula goes over into the next, 1/angstrom. */
  kinks: readonly number[];
}

/** The join ends at this multiple of its start (s = 2 to 3 per angstrom). */
const JOIN = 1.5;
const FOUR_PI = 4 * Math.PI;
/** Gaussians narrower than this belong to what is a point within the fit (width √b/2π below 0.016 angstrom). */
const NARROWEST = 0.01;

interface Density {
  a: number;
  b: number;
}

/** Electrons within reach of q, with a bound of the error. */
type Electrons = (q: number) => { value: number; error: number };

/** a exp(-b s²) as the transform of a Gaussian density, by quadrature. */
function densityQuadrature({ a, b }: Density): Electrons {
  const width = Math.sqrt(b) / (2 * Math.PI);
  const height = (4 * a) / (Math.sqrt(Math.PI) * width ** 3);
  return radialQuadrature(
    {
      integrand: (r) => r * height * Math.exp(-((r / width) ** 2)),
      edges: [0, 2 * width, 4 * width, 7.2 * width],
      tail: 1e-20 * Math.abs(a),
    },
    Math.abs(a),
  );
}

function closedDensity({ a, b }: Density): Electrons {
  return (q) => {
    const exponent = b * (q / FOUR_PI) ** 2;
    const value = a * Math.exp(-exponent);
    return { value, error: (4 + 4 * Math.abs(exponent)) * UNIT_ROUNDOFF * Math.abs(value) };
  };
}

function total(parts: readonly Electrons[], constant: number): Electrons {
  return (q) =>
    parts.reduce(
      (sum, part) => {
        const { value, error } = part(q);
        return { value: sum.value + value, error: sum.error + error };
      },
      { value: constant, error: 0 },
    );
}

/** 2/(a0 q²) is 1/(8π² a0 s²). */
const perCharge = (q: number) => 2 / (BOHR * q * q);

/**
 * High momentum transfer: the nucleus less the electrons, by the Mott-Bethe formula.
 *
 * Formula: f_e = (Z - f_x(s))/(8π² a0 s²), s = q/4π. f_x is the fit of Waasmaier and Kirfel to s = 6 per angstrom, then
 *   f_x(6) (6/s)². From the end of the Gaussian fit to 1.5 times it the ratio of the two goes over into one smoothly, so that
 *   the factor has no step.
 *
 * @param symbol element
 * @param joint q where the Gaussian fit of f_e ends, 1/angstrom
 * @param atJoint f_e of that fit there, angstrom
 * @returns f_e in angstrom with a bound of its rounding, for q above the joint
 *
 * Validity: f_x to the accuracy of the fits; beyond s = 6 it lies between 0 and f_x(6), at most 6 % of Z.
 *
 * Source: N. F. Mott, Proc. R. Soc. A 127 (1930) 658; H. Bethe, Ann. Phys. 5 (1930) 325.
 */
export function mottBetheTail(symbol: string, joint: number, atJoint: number): TailRoutes {
  const { atomicNumber: Z, a, b, c, fittedTo } = xrayFormFactor(symbol);
  const densities = a.map((height, i) => ({ a: height, b: b[i] ?? NaN }));
  const last = FOUR_PI * fittedTo;
  const closed = total(densities.map(closedDensity), c);
  const numerical = total(
    densities.map((density) =>
      density.b < NARROWEST ? closedDensity(density) : densityQuadrature(density),
    ),
    c,
  );
  const ratio = atJoint / (perCharge(joint) * (Z - closed(joint).value));
  const weight = (q: number) => {
    const x = Math.min(1, (q / joint - 1) / (JOIN - 1));
    return ratio + (1 - ratio) * x * x * (3 - 2 * x);
  };
  const size = densities.reduce((sum, { a: height }) => sum + Math.abs(height), Z + Math.abs(c));
  const routeBy =
    (electrons: Electrons) =>
    (q: number): NumericalResult => {
      const share = Math.min(1, last / q) ** 2;
      const { value: fx, error } = electrons(Math.min(q, last));
      const unit = perCharge(q) * Math.max(1, ratio);
      // |q d/dq|: 2 from the power, 2/e from each Gaussian, 4.5 |1 - ratio| from the join.
      const slope = (4 + 6 * Math.abs(1 - ratio)) * size;
      return {
        value: perCharge(q) * (Z - fx * share) * weight(q),
        error: unit * (error + 16 * UNIT_ROUNDOFF * size + Q_ALLOWANCE * slope),
        evaluations: 0,
        status: 'converged',
      };
    };
  return {
    closed: routeBy(closed),
    quadrature: routeBy(numerical),
    kinks: [joint, JOIN * joint, last],
  };
}
