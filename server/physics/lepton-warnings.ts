import { FINE_STRUCTURE, HBAR_C_EV_ANGSTROM } from './constants/codata2022.ts';
import type { EstimateResult } from './estimate.ts';
import { isRelativisticLepton, leptonFactor, spinObstacle } from './lepton-factor.ts';
import type { AngularFactor } from './methods/lepton-spin.ts';
import { leptonSpinWithMass } from './methods/lepton-spin.ts';
import { MCKINLEY_FESHBACH_LIMIT } from './methods/spin-factor.ts';
import type { Problem } from './problem.ts';
import type { Warning } from './warning.ts';

/** Of the square of the momentum over that of the target's mass: below it a magnetic moment does not show. */
const MAGNETIC = 1e-3;

/** Share of dσ/dΩ at 90 degrees from which the mass of the lepton in the recoil is told; ten times that far back. */
const NOTICED = 1e-3;
const TEN_TIMES_NOTICED = 10 * NOTICED;

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

/** Mott's formula takes the lepton for light; what that costs where it is not. */
function massInRecoil(
  { projectile, target, collision }: Problem,
  plain: AngularFactor,
): Warning | null {
  if (target.mass === Infinity) return null;
  const kept = leptonSpinWithMass(projectile.mass, target.mass, collision);
  const more = (theta: number) => kept(theta) / plain(theta).value - 1;
  const [across, back] = [more(Math.PI / 2), more((5 * Math.PI) / 6)];
  if (!(Math.abs(across) > NOTICED || Math.abs(back) > TEN_TIMES_NOTICED)) return null;
  const percent = (share: number) =>
    `${(100 * Math.abs(share)).toPrecision(2)} % ${share > 0 ? 'larger' : 'smaller'}`;
  return {
    code: 'leptonMassInRecoil',
    level: 'caution',
    message: `The Mott formula with the recoil E′/E takes the lepton for much lighter than its energy. With its mass kept, first order for a target without spin is ${percent(across)} at 90 degrees and ${percent(back)} at 150 degrees (centre of mass).`,
  };
}

/** What is said of the spin of a relativistic lepton. */
export function leptonWarnings({ problem }: EstimateResult): (Warning | null)[] {
  if (!isRelativisticLepton(problem) || !isElectrostatic(problem)) return [];
  const factor = leptonFactor(problem);
  if (!factor) return [missing(problem)];
  return [
    massInRecoil(problem, factor.plain),
    magneticMoment(problem),
    factor.corrected && correctionRange(factor.chargeProduct),
    applied(problem),
  ];
}
