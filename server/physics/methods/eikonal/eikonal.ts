import type { Term } from '#server/physics/potentials/types.ts';
import type { Amplitude, MethodAmplitude, Unavailable } from '../amplitude.ts';
import { localPotential } from '../local-potential.ts';
import type { MethodInput } from '../method-input.ts';
import { eikonalConditions } from './conditions.ts';
import { impactAmplitude, type ImpactAmplitude } from './impact-amplitude.ts';
import { eikonalPhase } from './phase.ts';
import { pointCharges } from './point-charges.ts';
import { whyNoEikonal } from './refusals.ts';
import { eikonalShells, transmissionOnPanels } from './shells.ts';
import { beyondFirstOrder, besideCharges, removedBeyond, type Removed } from './transmission.ts';

const TOO_WILD: Unavailable = {
  unavailable:
    'The eikonal phase turns too fast near the centre of the potential, or the rim of a shell, to be integrated: the potential is too strong or too singular there for this method.',
};
/** Phase up to which its turns are followed, rad. */
const MOST_PHASE = 3000;
/** An amplitude that is not known to this of its forward value is none. */
const WORST = 1e-7;
const NOTHING: Removed = { value: 0, error: 0 };

/** What is integrated over impact parameters: its amplitude, and what it removes beyond first order. */
interface Integrated {
  amplitude: ImpactAmplitude | null;
  removed: Removed;
}

function integrated(
  active: readonly Term[],
  input: MethodInput,
  eta: number,
): Integrated | Unavailable {
  const { k, twoMuOverHbar2 } = input;
  const potential = localPotential(active, twoMuOverHbar2);
  const { edges } = potential;
  if (edges.length === 0) return { amplitude: null, removed: NOTHING };
  const smooth = eikonalPhase(active, input);
  if (smooth === null) return TOO_WILD;
  const largest = edges.slice(1).reduce((most, b) => Math.max(most, Math.abs(smooth(b).re)), 0);
  if (!(largest <= MOST_PHASE)) return tooStrong(largest);
  const shells = eikonalShells(potential, k);
  const transmission = eta === 0 ? beyondFirstOrder : besideCharges(eta, k);
  const source = transmissionOnPanels(potential, shells, smooth, transmission, eta, k);
  if (source === null) return TOO_WILD;
  return {
    amplitude: impactAmplitude(source, k),
    removed: potential.im === null ? NOTHING : removedBeyond(smooth, source),
  };
}

function tooStrong(phase: number): Unavailable {
  return {
    unavailable: `The eikonal phase reaches ${phase.toPrecision(2)} rad: at this energy the potential is far too strong for a straight path.`,
  };
}

function sum(one: Amplitude, other: Amplitude | undefined): Amplitude {
  if (!other) return one;
  return { re: one.re + other.re, im: one.im + other.im, error: one.error + other.error };
}

/**
 * Eikonal amplitude of a sum of terms.
 *
 * Formula: f = -ik ∫ b J0(qb) (e^{i chi} - 1) db, chi(b) = -(1/hbar v) ∫ V dz. Its part of first order in chi is f1(q) and is taken in
 *   closed form: f = f1(q) - ik ∫ b J0(qb) (e^{i chi} - 1 - i chi) db. With a Coulomb tail: the amplitude of the point charges, in closed
 *   form, and -ik ∫ b J0(qb) (kb)^{2i eta} (e^{i chi} - 1) db with chi of what the tail leaves. Absorption is 2π ∫ b (1 - |e^{i chi}|²) db.
 *
 * @param input interaction, its first order, and k (1/angstrom)
 * @returns amplitude with a bound of its error, absorption in angstrom², and conditions; or why there is none
 *
 * Validity: k times the range far above one, |V| far below the energy, small angles; q = 2k sin(theta/2) is taken across the mean
 * direction, so that the point charges are exact.
 *
 * Source: R. J. Glauber, High-Energy Collision Theory (Interscience, 1959), 315; S. J. Wallace, Ann. Phys. 78 (1973) 190.
 */
export function eikonal(input: MethodInput): MethodAmplitude | Unavailable {
  const { terms, born, k } = input;
  const active = terms.filter(({ strength }) => strength.re !== 0 || strength.im !== 0);
  for (const term of active) {
    const reason = whyNoEikonal(term);
    if (reason !== null) return { unavailable: reason };
  }
  if (born.tail.im !== 0) {
    return { unavailable: 'The eikonal knows Coulomb tails of real charges only.' };
  }
  const eta = born.tail.re / (2 * k);
  const found = integrated(active, input, eta);
  if ('unavailable' in found) return found;
  const { amplitude, removed } = found;
  const first = (q: number, blur: number): Amplitude =>
    eta === 0 ? born.shortRange(q, blur) : { re: 0, im: 0, error: 0 };
  const shortRange = (q: number, blur = 0) => sum(first(q, blur), amplitude?.at(q, blur));
  const lost = amplitude?.largestError ?? 0;
  const forward = shortRange(0);
  if (lost > WORST * Math.hypot(forward.re, forward.im)) {
    return {
      unavailable:
        'The eikonal amplitude is lost in rounding: what is left of it is far smaller than first order, which it must cancel.',
    };
  }
  const charges = eta === 0 ? null : pointCharges(eta, k);
  return {
    amplitude: (q, blur = 0) => {
      if (charges === null) return shortRange(q, blur);
      return q === 0 ? null : sum(charges(q, blur), shortRange(q, blur));
    },
    shortRange,
    tail: born.tail,
    floor: born.floor + lost,
    flip: null,
    absorption: absorption(born.shortRange(0), removed, k),
    conditions: eikonalConditions(active, input),
  };
}

/** First order removes (4π/k) Im f1(0) = 2π ∫ b 2 Im chi db. */
function absorption(first: Amplitude, removed: Removed, k: number) {
  if (first.im === 0) return NOTHING;
  const factor = (4 * Math.PI) / k;
  return {
    value: factor * first.im + removed.value,
    error: factor * first.error + removed.error,
  };
}
