import type { EntityManager } from '@mikro-orm/postgresql';
import { runPlanTrialsSchema } from '#shared/contracts/run-plan-trials.ts';
import type { RunPlanTrials } from '#shared/contracts/run-plan-trials.ts';
import { DomainError } from '#shared/errors.ts';
import { Job } from '#server/jobs/job.entity.ts';

/** The numbers of a Monte Carlo run that is done; refused (409) before that. */
export async function trialsResult(em: EntityManager, id: string): Promise<RunPlanTrials> {
  const job = await em.findOneOrFail(Job, { id });
  if (job.state !== 'done') {
    throw new DomainError(
      'conflict',
      `The run is ${job.state} (${job.done} of ${job.total} parts); its result is there when it is done.`,
      { extra: { state: job.state, done: job.done, total: job.total } },
    );
  }
  return runPlanTrialsSchema.parse(job.result);
}
