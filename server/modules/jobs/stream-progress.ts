import { setTimeout as sleep } from 'node:timers/promises';
import type { EntityManager } from '@mikro-orm/postgresql';
import { isEnded } from '#shared/contracts/jobs.ts';
import { isDatabaseAway } from '#server/db/faults.ts';
import { eventStream } from '#server/http/event-stream.ts';
import { OtherAnswer } from '#server/http/other-answer.ts';
import { jobRow } from './job-rows.ts';
import { presentProgress } from './present-job.ts';
import type { Pace } from './present-job.ts';

const LOOK_MILLISECONDS = 500;
const LAST = 'ended';
/** The pace is that of the last so many milliseconds, once a fifth of them is seen. */
const WINDOW = 15_000;

/** Watches the count of parts; the pace of late, which a pause long ago does not spoil. */
function paceWatch() {
  let seen: { at: number; done: number }[] = [];
  return (done: number): Pace | undefined => {
    const at = Date.now();
    seen = [...seen.filter((one) => at - one.at <= WINDOW), { at, done }];
    const first = seen[0];
    if (!first || at - first.at < WINDOW / 5 || done <= first.done) return undefined;
    return { done: done - first.done, seconds: (at - first.at) / 1000 };
  };
}

/**
 * Events `progress` from the state now to the end of the job, whatever came before: a stream taken up again begins with the truth.
 * A client that heard the end is told (204) not to come again.
 */
export function streamProgress(
  { em, actor }: { em: EntityManager; actor: { id: string } },
  id: string,
  lastEventId: string | string[] | undefined,
): OtherAnswer {
  if (lastEventId === LAST) return new OtherAnswer((res) => void res.status(204).end());
  return eventStream(actor.id, async (send, signal) => {
    let before = '';
    const paceOf = paceWatch();
    while (!signal.aborted) {
      const row = await jobRow(em, id).catch((fault: unknown) => {
        if (isDatabaseAway(fault)) return undefined;
        throw fault;
      });
      if (row) {
        const data = presentProgress(row, paceOf(row.done));
        const ended = isEnded(row.state);
        const now = JSON.stringify(data);
        if (now !== before) {
          send({ id: ended ? LAST : `${row.state}-${row.done}`, event: 'progress', data });
        }
        before = now;
        if (ended) return;
      }
      await sleep(LOOK_MILLISECONDS, undefined, { signal }).catch(() => undefined);
    }
  });
}
