import { COULOMB_EV_ANGSTROM, BOHR } from './constants/codata2022.ts';
import type { EstimateResult } from './estimate.ts';
import { scalesOf } from './problem-scales.ts';
import { leptonWarnings } from './lepton-warnings.ts';
import { methodWarnings } from './method-warnings.ts';
import { tableResolution } from './table-warnings.ts';
import {
  boundLength,
  chargesDiffer,
  fastNeutron,
  incoherentAdded,
  ofTerms,
} from './term-warnings.ts';
import type { Warning } from './warning.ts';
import { twoBody } from './kinematics/two-body.ts';
import type { Term } from './potentials/types.ts';
import type { Problem } from './problem.ts';

const FERMI = 1e-5;
const DEGREE = Math.PI / 180;
const TEN_RANGES = 10;
const FAST = 0.1;
/** Equal masses have the same wave number with relativity as without. */
const UNCHANGED = 1e-9;

const percent = (fraction: number) => `${(100 * fraction).toPrecision(2)} %`;
const degrees = (radians: number) => `${(radians / DEGREE).toPrecision(3)} degrees`;
const isActive = ({ strength }: Term) => strength.re !== 0 || strength.im !== 0;

function chargeForms({ terms }: Problem): Term[] {
  return terms.filter(({ chargeProduct }) => chargeProduct !== undefined);
}

/** Strength of all bare tails, eV angstrom: the charge product times e². */
function tailOf({ terms }: Problem): number {
  return terms.reduce((sum, { strength, coulombTail }) => sum + strength.re * coulombTail, 0);
}

function coulombTotal({ problem }: EstimateResult): Warning | null {
  if (tailOf(problem) === 0) return null;
  return {
    code: 'coulombTotalDiverges',
    level: 'info',
    message:
      'Integrals over all angles diverge for a bare 1/r potential. For a finite total use the screened Coulomb form, or integrate the curve over the angles your detector sees.',
    path: '/interaction/terms',
  };
}

function exchangePhase({ problem, beyond }: EstimateResult): Warning | null {
  if (problem.exchangeSpin === null || tailOf(problem) === 0) return null;
  const exact = beyond.partialWaves;
  const instead =
    exact && !('unavailable' in exact)
      ? 'The curve of partial waves has the phase: take the interference from it.'
      : 'Trust the sum of the two directions, not its oscillation, or ask for partial waves, which have the phase.';
  return {
    code: 'coulombPhaseMissing',
    level: 'caution',
    message: `First-order Coulomb amplitudes lack the phase eta ln sin²(theta/2), so the interference of the two identical particles is not that of the published (Mott) values. ${instead}`,
  };
}

function noCharge({ problem }: EstimateResult): Warning | null {
  const neutral = chargeForms(problem).find((term) => !isActive(term));
  if (!neutral) return null;
  return {
    code: 'noCharge',
    level: 'caution',
    message: `The ${neutral.form} term has no strength, because projectile or target has no charge. Give the target its charge, or the term a chargeProduct.`,
    path: '/interaction/terms',
  };
}

function smallBox({ goldenRule, problem }: EstimateResult): Warning | null {
  const { range } = scalesOf(problem);
  if ('unavailable' in goldenRule || !(goldenRule.boxSide < TEN_RANGES * range)) return null;
  return {
    code: 'boxTooSmall',
    level: 'caution',
    message: `The box is ${(goldenRule.boxSide / range).toPrecision(3)} ranges wide; the golden rule wants at least ten, so that the potential lies inside and momentum is nearly continuous.`,
    path: '/goldenRule/boxSide',
  };
}

/** Thomas-Fermi length of the electrons, angstrom. */
const screeningLength = (charge: number) => (0.88534 * BOHR) / Math.cbrt(charge);

function screening({ problem }: EstimateResult): Warning | null {
  const { target, projectile, collision } = problem;
  if (tailOf(problem) === 0 || projectile.charge === 0) return null;
  if (target.massNumber === null || !(target.charge > 1)) return null;
  const length = screeningLength(target.charge);
  const sine = 1 / (2 * collision.k * length);
  const points = problem.terms.every((term) => term.coulombTail === 0 || isPointCharge(term));
  // A cloud of <r²> = 6a² screens small angles as exp(-r/a) does.
  const mend = points
    ? `add their screening with the screened Coulomb form (a about ${length.toPrecision(3)} angstrom)`
    : `add them as an extendedCharge of opposite chargeProduct with the rms radius of the atom (about ${(Math.sqrt(6) * length).toPrecision(3)} angstrom)`;
  const where =
    sine < 1 ? `below about ${degrees(2 * Math.asin(sine))} (centre of mass)` : 'at every angle';
  return {
    code: 'screeningLeftOut',
    level: 'caution',
    message: `The electrons of the atom are left out by a bare Coulomb potential. They matter ${where}; ${mend}.`,
    path: '/interaction/terms',
  };
}

const radiusOf = (massNumber: number) => 1.2 * Math.cbrt(massNumber) * FERMI;

/** Ions that come within the range of nuclear forces: head-on distance against the radii and three fermi. */
function nuclearContact({ problem }: EstimateResult): Warning | null {
  const { projectile, target, collision } = problem;
  const product = projectile.charge * target.charge;
  if (!chargeForms(problem).some(isActive) || projectile.kind !== 'hadron' || product === 0) {
    return null;
  }
  if (projectile.massNumber === null || target.massNumber === null) return null;
  // A term that is no charge is the nuclear force, as the person sees it.
  const other = (term: Term) => isActive(term) && term.chargeProduct === undefined;
  if (problem.terms.some(other)) return null;
  const touching = radiusOf(projectile.massNumber) + radiusOf(target.massNumber) + 3 * FERMI;
  const headOn = (product * COULOMB_EV_ANGSTROM) / collision.energyCm;
  if (headOn > touching) return null;
  const sine = 1 / ((2 * touching) / headOn - 1);
  return {
    code: 'nuclearForces',
    level: 'caution',
    message: `A head-on collision brings the nuclei to ${(headOn / FERMI).toPrecision(3)} fm, within reach of nuclear forces (${(touching / FERMI).toPrecision(3)} fm, radii and 3 fm). A Coulomb potential alone will not do beyond about ${degrees(2 * Math.asin(Math.min(1, sine)))} (centre of mass).`,
  };
}

/** A charge that is all at the origin: nothing is left of its potential but the bare tail. */
const isPointCharge = (term: Term) => isActive(term) && term.coulombTail !== 0 && term.norm === 0;

/** Leptons whose wave resolves the nucleus. */
function finiteNucleus({ problem }: EstimateResult): Warning | null {
  const { projectile, target, collision, terms } = problem;
  if (projectile.kind !== 'lepton' || target.massNumber === null || !terms.some(isPointCharge)) {
    return null;
  }
  const largest = 2 * collision.k * radiusOf(target.massNumber);
  if (!(largest > 0.5)) return null;
  return {
    code: 'pointNucleus',
    level: 'caution',
    message: `The nucleus is taken as a point, but q times its radius reaches ${largest.toPrecision(3)}: its form factor lowers the cross section at large angles. The form extendedCharge has it.`,
    path: '/interaction/terms',
  };
}

function slowKinematics({ problem }: EstimateResult): Warning | null {
  const { regime, projectile, target, energy, collision } = problem;
  if (regime === 'relativistic') return null;
  const exact = twoBody({
    projectileMass: projectile.mass,
    targetMass: target.mass,
    energy,
    regime: 'relativistic',
  });
  if (!(exact.betaLab > FAST)) return null;
  const charged = chargeForms(problem).some(isActive);
  const power = charged ? 2 : 0;
  const size = (c: { reducedMass: number; k: number }) => (c.reducedMass / c.k ** power) ** 2;
  const change = size(exact) / size(collision) - 1;
  const faster = exact.k / collision.k - 1;
  const wave =
    faster < UNCHANGED
      ? 'the wave number is right'
      : `the wave number is ${percent(faster)} too small`;
  const what = charged ? 'a point-charge cross section' : 'the forward cross section';
  return {
    code: 'nonrelativisticKinematics',
    level: 'caution',
    message: `The projectile moves at ${exact.betaLab.toPrecision(3)} c. Without relativity ${wave} and ${what} ${percent(Math.abs(change))} too ${change > 0 ? 'small' : 'large'}; choose relativistic kinematics.`,
    path: '/kinematics',
  };
}

function notDrawn({ potential }: EstimateResult): Warning | null {
  if ('unavailable' in potential || potential.note === null) return null;
  return { code: 'potentialIncomplete', level: 'info', message: potential.note };
}

function identicalIntegrals({ problem }: EstimateResult): Warning | null {
  if (problem.exchangeSpin === null) return null;
  return {
    code: 'identicalParticles',
    level: 'info',
    message:
      'Projectile and target are identical: dσ/dΩ counts both, and every integral is half of that over the sphere, so that it counts collisions.',
  };
}

function elasticOnly(): Warning {
  return {
    code: 'elasticOnly',
    level: 'info',
    message:
      'Elastic scattering only: inelastic and reaction channels are not part of these numbers.',
  };
}

/** Cautions about a result, few and in order of weight; codes are stable. */
export function warningsOf(result: EstimateResult): Warning[] {
  const found = [
    nuclearContact(result),
    slowKinematics(result),
    ...leptonWarnings(result),
    finiteNucleus(result),
    exchangePhase(result),
    noCharge(result),
    chargesDiffer(result),
    fastNeutron(result),
    screening(result),
    smallBox(result),
    coulombTotal(result),
    boundLength(result),
    identicalIntegrals(result),
    ...methodWarnings(result),
    notDrawn(result),
    ...ofTerms(result),
    tableResolution(result),
    incoherentAdded(result),
    elasticOnly(),
  ];
  return found.filter((warning) => warning !== null);
}
