import { UNCERTAIN_INPUTS } from '#shared/contracts/run-plans.ts';
import type { RunPlanRequest } from '#shared/contracts/run-plans.ts';
import type { Faults } from '#server/modules/estimates/faults.ts';
import type { GivenUncertainties } from '#server/physics/counting/uncertainty-lines.ts';

/** What was not said of an uncertainty: known from elsewhere, normal, without end of degrees of freedom. */
export function toUncertainties(
  { uncertainties = {}, uncertaintyKinds = {} }: RunPlanRequest,
  faults: Faults,
): GivenUncertainties {
  const given: GivenUncertainties = {};
  for (const input of UNCERTAIN_INPUTS) {
    const value = uncertainties[input];
    const kind = uncertaintyKinds[input];
    if (value === undefined) {
      if (kind) {
        faults.add(
          `/uncertaintyKinds/${input}`,
          `How ${input} is known means nothing without its uncertainty: give uncertainties.${input}.`,
        );
      }
      continue;
    }
    given[input] = {
      value,
      type: kind?.type ?? 'B',
      distribution: kind?.distribution ?? 'normal',
      freedom: kind?.freedom ?? Infinity,
    };
  }
  return given;
}
