import type { Estimate } from '#shared/contracts/estimates.ts';
import { estimate } from '#server/physics/estimate.ts';
import { readingAids } from '#server/physics/reading-aids.ts';
import { presentAids } from './present-aids.ts';
import { presentEstimate } from './present-estimate.ts';
import { toAids } from './to-aids.ts';
import type { EstimateTask } from './to-problem.ts';
import { toProblem } from './to-problem.ts';

/** The whole way of an estimate, as a thread walks it: units end, physics, units begin again. */
export function computeEstimate(request: EstimateTask): Estimate {
  const problem = toProblem(request);
  if (request.aids === undefined) return presentEstimate(estimate(problem), request);
  const asked = toAids(request);
  const answer = presentEstimate(estimate(problem), request);
  return { ...answer, aids: presentAids(readingAids(problem, asked), problem, request) };
}
