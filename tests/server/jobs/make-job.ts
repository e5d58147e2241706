import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/postgresql';
import { Job } from '#server/jobs/job.entity.ts';
import { energyScan } from './scan-requests.ts';

/** A scan without shares, so that no worker takes it; what is not said is invented. */
export async function makeJob(
  em: EntityManager,
  changes: Partial<Job> & Pick<Job, 'ownerId'>,
): Promise<Job> {
  const job = em.create(Job, {
    id: randomUUID(),
    kind: 'scan',
    title: 'Total cross section over energy',
    campaignId: null,
    input: energyScan,
    state: 'cancelled',
    done: 0,
    total: 20,
    error: null,
    result: null,
    createdAt: new Date(),
    startedAt: null,
    servedAt: null,
    finishedAt: null,
    ...changes,
  });
  await em.persistAndFlush(job);
  return job;
}
