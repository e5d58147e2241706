import { leptonFactor } from './lepton-factor.ts';
import type { Scales } from './observables/cone-samples.ts';
import type { Problem } from './problem.ts';

const isActive = ({ strength }: { strength: { re: number; im: number } }) =>
  strength.re !== 0 || strength.im !== 0;

/** Lengths that decide how finely amplitudes are sampled. */
export function scalesOf({ terms }: Pick<Problem, 'terms'>): Scales {
  const active = terms.filter(isActive);
  return {
    range: Math.max(0, ...active.map((term) => term.range ?? 0)),
    edge: Math.max(0, ...active.flatMap((term) => term.breakpoints)),
    terms: Math.max(1, active.length),
    kinks: active.flatMap((term) => term.kinks ?? []),
  };
}

/** What stands after the square of the amplitude. */
export function beyondAmplitude(problem: Problem) {
  const lepton = leptonFactor(problem);
  return {
    factor: lepton && (lepton.corrected ?? lepton.plain),
    incoherent: incoherentOf(problem),
  };
}

/** Incoherent scattering of all terms together, angstrom²/sr. */
export const incoherentOf = ({ terms }: Problem): number =>
  terms.reduce((sum, { incoherent = 0 }) => sum + incoherent, 0);
