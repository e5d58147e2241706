import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import type { CaseFacts } from '#shared/mix-up-factors.ts';
import { composedFactor } from '#shared/units/composed.ts';

/** Masses, speed and charge of a case, as far as slips are made with them. */
export function factsOf(
  { kinematics, target, energy }: CaseDocument,
  estimate: Estimate,
): CaseFacts {
  const { energyCm, beta } = estimate.kinematics;
  const relativistic = kinematics === 'relativistic';
  const lab = energy.value * composedFactor(energy.unit, energyCm.unit);
  return {
    massShare: relativistic || target.kind === 'fixed' ? null : 1 - energyCm.value / lab,
    gamma: relativistic ? 1 / Math.sqrt(1 - beta ** 2) : 1,
    charge: 'charge' in target ? target.charge : null,
  };
}
