import type { AngularFactor } from './methods/lepton-spin.ts';
import { leptonSpin } from './methods/lepton-spin.ts';
import type { Term } from './potentials/types.ts';
import type { Problem } from './problem.ts';

/** What the spin of a relativistic lepton does to dσ/dΩ; `corrected` is null where the correction was not asked for. */
export interface LeptonFactor {
  plain: AngularFactor;
  corrected: AngularFactor | null;
  /** Z1 Z2 of all terms together. */
  chargeProduct: number;
}

const isActive = ({ strength }: Term) => strength.re !== 0 || strength.im !== 0;

/** Whether the spin of the projectile is a question at all. */
export function isRelativisticLepton({ projectile, regime }: Problem): boolean {
  return projectile.kind === 'lepton' && regime === 'relativistic';
}

/** Z1 Z2 of the electrostatic terms together. */
export function chargeProductOf({ terms }: Pick<Problem, 'terms'>): number {
  return terms.reduce((sum, { chargeProduct = 0 }) => sum + chargeProduct, 0);
}

/** Why the spin cannot be taken into account, in words; null where it can. */
export function spinObstacle(problem: Problem): string | null {
  const { projectile, target, terms, exchangeSpin } = problem;
  const active = terms.filter(isActive);
  const other = active.find(({ chargeProduct }) => chargeProduct === undefined);
  if (other) {
    return `the ${other.form} term is not the potential of a charge, and how it acts on a spin is not said`;
  }
  if (target.kind === 'lepton' || exchangeSpin !== null) {
    return 'two leptons scatter by the formulas of Møller and Bhabha, which are not part of this version';
  }
  if (target.mass < projectile.mass) return 'the projectile is heavier than its target';
  return null;
}

/** The factor of a relativistic lepton on electrostatic forms; null where the question does not arise or the way is barred. */
export function leptonFactor(problem: Problem): LeptonFactor | null {
  const { projectile, target, energy, collision, terms, corrections } = problem;
  const charged = terms.some((term) => isActive(term) && term.chargeProduct !== undefined);
  if (!isRelativisticLepton(problem) || !charged || spinObstacle(problem) !== null) return null;
  const chargeProduct = chargeProductOf(problem);
  const factor = (correctedFor: number | null) =>
    leptonSpin({
      mass: projectile.mass,
      targetMass: target.mass,
      energy,
      collision,
      correctedFor,
    });
  const asked = corrections.includes('mckinleyFeshbach');
  return { plain: factor(null), corrected: asked ? factor(chargeProduct) : null, chargeProduct };
}
