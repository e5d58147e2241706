import type { Term } from '#server/physics/potentials/types.ts';
import type { Amplitude, MethodAmplitude, Unavailable } from '../amplitude.ts';
import { localPotential } from '../local-potential.ts';
import type { MethodInput } from '../method-input.ts';
import { beyondFirst, removedBeyondFirst } from './beyond-first.ts';
import { eikonalConditions } from './conditions.ts';
import { impactAmplitude, type ImpactAmplitude } from './impact-amplitude.ts';
import { impactPanels, sumOver, type ImpactPanels } from './impact-panels.ts';
import { eikonalPhase, type EikonalPhase } from './phase.ts';
import { whyNoEikonal } from './refusals.ts';

/** A phase that is not known to this of itself is none. */
const WORST_PHASE = 1e-9;
const TOO_WILD: Unavailable = {
  unavailable:
    'The eikonal phase turns too fast near the centre of the potential to be integrated: the potential is too strong or too singular there for this method.',
};

/** What the exponential adds to first order, and the bound of the errors of the phase. */
interface Beyond {
  amplitude: ImpactAmplitude;
  /** 2π ∫ b (1 - |e^{i chi}|² - 2 Im chi) db. */
  absorption: { value: number; error: number };
}

/** ∫ b |d(e^{i chi} - 1 - i chi)/d chi| |chi| db, with the panels of the function itself. */
function sensitivity({ panels }: ImpactPanels, phase: EikonalPhase): number {
  return panels.reduce((sum, panel) => {
    return (
      sum +
      sumOver(panel, (b) => {
        const { re, im } = phase.at(b);
        const change = Math.hypot(Math.exp(-im) * Math.cos(re) - 1, Math.exp(-im) * Math.sin(re));
        return b * change * Math.hypot(re, im);
      })
    );
  }, 0);
}

function beyondFirstOrder(active: readonly Term[], input: MethodInput): Beyond | Unavailable {
  const { k, twoMuOverHbar2 } = input;
  const { edges, im } = localPotential(active, twoMuOverHbar2);
  const phase = eikonalPhase(active, input);
  if (phase === null || edges.length === 0) return TOO_WILD;
  const source = impactPanels((b) => beyondFirst(phase.at(b)), edges, 1e-15);
  if (source === null) return TOO_WILD;
  const relative = phase.relativeError(source.panels.map(({ a, b }) => (a + b) / 2));
  if (!(relative <= WORST_PHASE)) return TOO_WILD;
  const ofPhase = relative * sensitivity(source, phase);
  const amplitude = impactAmplitude(source, k, ofPhase);
  const removed = im === null ? 0 : removedOf(source, phase);
  const error = im === null ? 0 : 4 * (source.missed + ofPhase) + 1e-14 * Math.abs(removed);
  return {
    amplitude,
    absorption: { value: 2 * Math.PI * removed, error: 2 * Math.PI * error },
  };
}

function removedOf({ panels }: ImpactPanels, phase: EikonalPhase): number {
  return panels.reduce(
    (sum, panel) => sum + sumOver(panel, (b) => b * removedBeyondFirst(phase.at(b).im)),
    0,
  );
}

/**
 * Eikonal amplitude of a sum of terms.
 *
 * Formula: f = -ik ∫ b J0(qb) (e^{i chi} - 1) db, chi(b) = -(1/hbar v) ∫ V dz; its part of first order in chi is f1(q) and is taken in
 *   closed form: f = f1(q) - ik ∫ b J0(qb) (e^{i chi} - 1 - i chi) db. Absorption is 2π ∫ b (1 - |e^{i chi}|²) db.
 *
 * @param input interaction, its first order, and k (1/angstrom)
 * @returns amplitude with a bound of its error, absorption in angstrom², and conditions; or why there is none
 *
 * Validity: k times the range far above one, |V| far below the energy, small angles; q is taken across the mean direction, q = 2k sin(theta/2).
 *
 * Source: R. J. Glauber, in Lectures in Theoretical Physics, vol. 1 (1959), 315; S. J. Wallace, Ann. Phys. 78 (1973) 190.
 */
export function eikonal(input: MethodInput): MethodAmplitude | Unavailable {
  const { terms, born, k } = input;
  const active = terms.filter(({ strength }) => strength.re !== 0 || strength.im !== 0);
  for (const term of active) {
    const reason = whyNoEikonal(term);
    if (reason !== null) return { unavailable: reason };
  }
  if (born.tail.re !== 0 || born.tail.im !== 0) {
    return { unavailable: 'The eikonal of a Coulomb tail is not computed.' };
  }
  const beyond = active.length === 0 ? null : beyondFirstOrder(active, input);
  if (beyond !== null && 'unavailable' in beyond) return beyond;
  const f = (q: number, blur = 0): Amplitude => {
    const first = born.shortRange(q, blur);
    if (beyond === null) return first;
    const more = beyond.amplitude.at(q, blur);
    return {
      re: first.re + more.re,
      im: first.im + more.im,
      error: first.error + more.error,
    };
  };
  return {
    amplitude: f,
    shortRange: f,
    tail: { re: 0, im: 0 },
    floor: Math.max(born.floor, beyond?.amplitude.largestError ?? 0),
    flip: null,
    absorption: absorption(born.shortRange(0), beyond, k),
    conditions: eikonalConditions(active, input),
  };
}

/** First order removes (4π/k) Im f1(0) = 2π ∫ b 2 Im chi db. */
function absorption(first: Amplitude, beyond: Beyond | null, k: number) {
  if (first.im === 0) return { value: 0, error: 0 };
  const factor = (4 * Math.PI) / k;
  return {
    value: factor * first.im + (beyond?.absorption.value ?? 0),
    error: factor * first.error + (beyond?.absorption.error ?? 0),
  };
}
