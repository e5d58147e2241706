import { randomUUID } from 'node:crypto';
import type { VerbContext } from '#server/http/context.ts';
import { DomainError } from '#shared/errors.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import type { JobKind } from './job-kind.ts';
import { Job } from './job.entity.ts';
import { JOB_KINDS } from './kinds.ts';
import type { JobKindName } from './kinds.ts';
import { wakeWorkers } from './wake-up.ts';

/** Jobs of one person that may wait or run at once. */
const MOST_AT_ONCE = 20;
/** Enough shares for many workers to end at nearly the same time. */
const SHARES = 64;

export interface JobOrder {
  kind: JobKindName;
  /** In words, for lists. */
  title: string;
  campaignId?: string | null;
  input: unknown;
}

function planShares({ shareOf }: JobKind, total: number): { size: number; count: number } {
  const size = Math.max(1, Math.min(shareOf, Math.ceil(total / SHARES)));
  return { size, count: Math.ceil(total / size) };
}

/** Files a job, cuts it into shares and wakes workers, all within one transaction of `em`. Answers its identifier. */
export async function createJob({ em, actor, now }: VerbContext, order: JobOrder): Promise<string> {
  const kind: JobKind = JOB_KINDS[order.kind];
  const total = kind.total(order.input);
  const id = randomUUID();
  await em.transactional(async (tx) => {
    const waiting = await tx.count(Job, {
      ownerId: actor.id,
      state: { $in: ['queued', 'running'] },
    });
    if (waiting >= MOST_AT_ONCE) {
      throw new DomainError(
        'tooManyRequests',
        `${MOST_AT_ONCE} of your jobs are waiting or running; wait for one to end, or cancel one.`,
        { extra: { retryAfter: 10 } },
      );
    }
    tx.create(
      Job,
      {
        id,
        kind: order.kind,
        title: order.title,
        ownerId: actor.id,
        campaignId: order.campaignId ?? null,
        input: order.input,
        state: 'queued',
        done: 0,
        total,
        error: null,
        result: null,
        createdAt: now,
        startedAt: null,
        servedAt: null,
        finishedAt: null,
      },
      { persist: true },
    );
    recordTrail(tx, {
      actor,
      action: 'job.create',
      subject: { type: 'job', id },
      after: { kind: order.kind, title: order.title, total },
      now,
    });
    await tx.flush();
    const { size, count } = planShares(kind, total);
    await tx.execute(
      `insert into job_shares (job_id, n, first_part, end_part)
       select ?, i, i * ?::integer, least(?::integer, (i + 1) * ?::integer)
       from generate_series(0, ?::integer - 1) as i`,
      [id, size, total, size, count],
    );
    if (kind.finish) {
      // A share without parts, taken when all others are finished.
      await tx.execute(
        'insert into job_shares (job_id, n, first_part, end_part) values (?, ?, ?, ?)',
        [id, count, total, total],
      );
    }
    await wakeWorkers(tx, id, count);
  });
  return id;
}
