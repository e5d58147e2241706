import { LockMode } from '@mikro-orm/core';
import { isEnded } from '#shared/contracts/jobs.ts';
import { DomainError } from '#shared/errors.ts';
import type { VerbContext } from '#server/http/context.ts';
import { Job } from '#server/jobs/job.entity.ts';
import { wakeWorkers } from '#server/jobs/wake-up.ts';
import { recordTrail } from '#server/trail/record-trail.ts';

/** Cancels a job that has not ended: from now on no worker can add to it. Done twice, it stays as it was. */
export async function cancelJob({ em, actor, now }: VerbContext, id: string): Promise<void> {
  await em.transactional(async (tx) => {
    const job = await tx.findOneOrFail(Job, { id }, { lockMode: LockMode.PESSIMISTIC_WRITE });
    if (job.state === 'cancelled') return;
    if (isEnded(job.state)) {
      throw new DomainError('conflict', `It is ${job.state} already; there is nothing to cancel.`);
    }
    const before = { state: job.state, done: job.done };
    job.state = 'cancelled';
    job.finishedAt = now;
    recordTrail(tx, { actor, action: 'job.cancel', subject: { type: 'job', id }, before, now });
  });
}

/** Lets a cancelled or failed job go on from what it has; nothing of it is computed twice. */
export async function resumeJob({ em, actor, now }: VerbContext, id: string): Promise<void> {
  await em.transactional(async (tx) => {
    const job = await tx.findOneOrFail(Job, { id }, { lockMode: LockMode.PESSIMISTIC_WRITE });
    if (!isEnded(job.state)) return;
    if (job.state === 'done') throw new DomainError('conflict', 'It is done already.');
    const before = { state: job.state, done: job.done };
    job.state = 'queued';
    job.error = null;
    job.finishedAt = null;
    recordTrail(tx, { actor, action: 'job.resume', subject: { type: 'job', id }, before, now });
    await tx.flush();
    await tx.execute('update job_shares set losses = 0 where job_id = ? and finished_at is null', [
      id,
    ]);
    const open = await tx.execute<unknown[]>(
      'select n from job_shares where job_id = ? and finished_at is null',
      [id],
    );
    await wakeWorkers(tx, id, open.length);
  });
}
