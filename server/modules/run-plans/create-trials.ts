import type { RunPlanTrialsRequest } from '#shared/contracts/run-plan-trials.ts';
import { LEAST_TRIALS } from '#shared/contracts/run-plan-trials.ts';
import type { Compute } from '#server/compute/compute.ts';
import type { VerbContext } from '#server/http/context.ts';
import { createJob } from '#server/jobs/create-job.ts';

/** A few trials, so that an input which can never be right is refused at once. */
export async function checkTrials(
  { plan, detector, seed }: RunPlanTrialsRequest,
  { compute, signal }: { compute: Compute; signal: AbortSignal },
): Promise<void> {
  const task = { plan, detector, seed, part: 0, trials: LEAST_TRIALS };
  await compute('runPlanTrials', task, { signal });
}

/** Files a Monte Carlo run for the workers. */
export function createTrials(context: VerbContext, request: RunPlanTrialsRequest): Promise<string> {
  const title = `Monte Carlo of ${request.detector}, ${request.trials} trials`;
  return createJob(context, { kind: 'runPlanTrials', title, input: request });
}
