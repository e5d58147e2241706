import { HBAR_EV_S, SPEED_OF_LIGHT_ANGSTROM_S } from '#server/physics/constants/codata2022.ts';
import type { Complex, Term } from '#server/physics/potentials/types.ts';
import type { TwoBody } from '#server/physics/kinematics/two-body.ts';
import { transform } from '#server/physics/methods/transform.ts';
import type { NumericalResult } from '#server/physics/numerics/result.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { DomainError } from '#shared/errors.ts';

/** ∫ V exp(iq·r) d³r with a bound of its error, eV angstrom³. */
export interface MatrixElement extends Complex {
  error: number;
  evaluations: number;
}

export interface GoldenRule {
  /** rad, centre of mass. */
  theta: number;
  /** 1/angstrom. */
  q: number;
  /** angstrom. */
  boxSide: number;
  matrixElementTimesVolume: MatrixElement;
  /** The same by quadrature; null where a term has none, or where it would take longer than everything else. */
  quadratureCheck: MatrixElement | null;
  /** Final states per energy and solid angle, 1/(eV sr). */
  densityOfStates: number;
  /** Transitions per time and solid angle, 1/(s sr). */
  rate: number;
  /** Incoming particles per area and time, 1/(angstrom² s). */
  flux: number;
  /** rate/flux, angstrom²/sr. */
  dcs: number;
}

const FOUR_PI = 4 * Math.PI;
/** Phase q·r over the reach of a term up to which the quadrature takes some milliseconds. */
const CHECKED_PHASE = 2e4;

function matrixElement(
  terms: readonly Term[],
  route: (term: Term) => NumericalResult | null,
): MatrixElement | null {
  const sum = { re: 0, im: 0, error: 0, evaluations: 0 };
  for (const term of terms) {
    const { strength } = term;
    if (strength.re === 0 && strength.im === 0) continue;
    const shape = route(term);
    if (shape === null || !Number.isFinite(shape.value)) return null;
    const size = FOUR_PI * Math.hypot(strength.re, strength.im);
    sum.re += FOUR_PI * strength.re * shape.value;
    sum.im += FOUR_PI * strength.im * shape.value;
    sum.error += size * (shape.error + 4 * UNIT_ROUNDOFF * Math.abs(shape.value));
    sum.evaluations += shape.evaluations;
  }
  return sum;
}

/**
 * The golden-rule sheet: from the matrix element in a box of side L to the cross section, step by step.
 *
 * Formula: L³V_fi = ∫ V exp(iq·r) d³r = 4 pi Σ strength · S(q); rho = L³ mu k/(8 pi³ hbar²) per steradian;
 * w = (2 pi/hbar) |V_fi|² rho; flux = hbar k/(mu L³); dσ/dΩ = w/flux.
 *
 * @param terms interaction
 * @param collision kinematics
 * @param theta rad, centre of mass
 * @param boxSide L, angstrom, > 0
 * @param route transform of a term; `transformWithoutTail` where the tails of all terms cancel
 * @returns every step; dcs does not depend on L but by rounding. Null where the matrix element diverges
 * @throws DomainError('invalidInput') for a box so small or large that its volume leaves double precision
 *
 * Validity: first order; the matrix element must be finite (theta > 0 for a Coulomb tail).
 *
 * Source: P. A. M. Dirac, Proc. R. Soc. A 114 (1927) 243; M. Born, Z. Phys. 38 (1926) 803.
 */
export function goldenRule(
  terms: readonly Term[],
  collision: TwoBody,
  theta: number,
  boxSide: number,
  route = transform,
): GoldenRule | null {
  const { k, twoMuOverHbar2, relativeVelocity } = collision;
  const q = 2 * k * Math.sin(theta / 2);
  const element = matrixElement(terms, (term) => route(term, q));
  if (element === null) return null;
  const volume = boxSide ** 3;
  const re = element.re / volume;
  const im = element.im / volume;
  const densityOfStates = ((volume * twoMuOverHbar2) / 2) * (k / (8 * Math.PI ** 3));
  const rate = ((2 * Math.PI) / HBAR_EV_S) * (re * re + im * im) * densityOfStates;
  const flux = (SPEED_OF_LIGHT_ANGSTROM_S * relativeVelocity) / volume;
  const sheet = { densityOfStates, rate, flux, dcs: rate / flux };
  const lost = (element.re !== 0 || element.im !== 0) && !(rate > 1e-290);
  if (lost || !Object.values(sheet).every(Number.isFinite)) {
    throw new DomainError(
      'invalidInput',
      'The volume of this box leaves double precision; choose a side nearer to the range of the interaction.',
      { errors: [{ path: '/goldenRule/boxSide', message: 'This box side is out of reach.' }] },
    );
  }
  const integrated = matrixElement(terms, ({ quadrature, reach, range, tail }) => {
    // A power tail is integrated along a turned path, whatever its reach.
    const extent = (tail === 'power' ? range : reach) ?? 0;
    return q * extent > CHECKED_PHASE ? null : (quadrature?.(q) ?? null);
  });
  // A bare Coulomb tail leaves nothing to integrate: its closed form would only be compared with itself.
  const quadratureCheck = integrated && integrated.evaluations > 0 ? integrated : null;
  return { theta, q, boxSide, matrixElementTimesVolume: element, quadratureCheck, ...sheet };
}
