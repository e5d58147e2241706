import type { Estimate, EstimateRequest } from '#shared/contracts/estimates.ts';
import { estimate } from '#server/physics/estimate.ts';
import { presentEstimate } from './present-estimate.ts';
import { toProblem } from './to-problem.ts';

/** The whole way of an estimate, as a thread walks it: units end, physics, units begin again. */
export function computeEstimate(request: EstimateRequest): Estimate {
  return presentEstimate(estimate(toProblem(request)), request);
}
