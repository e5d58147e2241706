import { FINE_STRUCTURE, HBAR_C_EV_ANGSTROM } from './constants/codata2022.ts';
import type { EstimateResult } from './estimate.ts';
import { isRelativisticLepton, leptonFactor, spinObstacle } from './lepton-factor.ts';
import { MCKINLEY_FESHBACH_LIMIT } from './methods/spin-factor.ts';
import type { Problem } from './problem.ts';
import type { Warning } from './warning.ts';

/** Of the square of the momentum over that of the target's mass: below it a magnetic moment does not show. */
const MAGNETIC = 1e-3;

const isElectrostatic = ({ terms }: Problem): boolean =>
  terms.some(
    ({ strength, chargeProduct }) =>
      chargeProduct !== undefined && (strength.re !== 0 || strength.im !== 0),
  );

function missing(problem: Problem): Warning | null {
  const why = spinObstacle(problem);
  if (why === null) return null;
  const square = problem.collision.betaLab ** 2;
  return {
    code: 'spinFactorMissing',
    level: 'caution',
    message: `The spin of the lepton is not in these numbers: ${why}. On a fixed charge alone dσ/dΩ would be multiplied by 1 − β² sin²(θ/2): ${(1 - square / 2).toPrecision(6)} at 90 degrees, ${(1 - square).toPrecision(6)} at 180 degrees.`,
  };
}

function applied({ target, corrections }: Problem): Warning {
  const recoil = target.mass === Infinity ? '' : ' and the recoil of the target (E′/E)';
  const more = corrections.includes('mckinleyFeshbach')
    ? ', with the correction of McKinley and Feshbach'
    : '';
  return {
    code: 'spinFactorApplied',
    level: 'info',
    message: `dσ/dΩ and its integrals contain the spin of the lepton, 1 − β² sin²(θ/2) at the lab angle${recoil}${more}; the amplitude and the golden-rule sheet do not.`,
  };
}

function correctionRange(chargeProduct: number): Warning | null {
  const size = Math.abs(FINE_STRUCTURE * chargeProduct);
  if (size <= MCKINLEY_FESHBACH_LIMIT) return null;
  return {
    code: 'correctionOutOfRange',
    level: 'caution',
    message: `The correction of McKinley and Feshbach is good to a few per cent for |α Z₁Z₂| below about ${MCKINLEY_FESHBACH_LIMIT}; here it is ${size.toPrecision(3)}.`,
    path: '/corrections',
  };
}

function magneticMoment({ target, collision }: Problem): Warning | null {
  if (target.mass === Infinity || !((target.spin ?? 0) > 0)) return null;
  const ratio = ((collision.k * HBAR_C_EV_ANGSTROM) / target.mass) ** 2;
  if (ratio < MAGNETIC) return null;
  return {
    code: 'magneticScatteringMissing',
    level: 'caution',
    message: `The target has spin ${target.spin}: what its magnetic moment scatters is not in these numbers. It grows as q²/4M² tan²(θ/2), which is ${ratio.toPrecision(2)} at 90 degrees for a moment of one magneton.`,
  };
}

/** What is said of the spin of a relativistic lepton. */
export function leptonWarnings({ problem }: EstimateResult): (Warning | null)[] {
  if (!isRelativisticLepton(problem) || !isElectrostatic(problem)) return [];
  const factor = leptonFactor(problem);
  if (!factor) return [missing(problem)];
  return [
    magneticMoment(problem),
    factor.corrected && correctionRange(factor.chargeProduct),
    applied(problem),
  ];
}
