import { setTimeout as sleep } from 'node:timers/promises';
import type { EntityManager } from '@mikro-orm/postgresql';
import { isEnded } from '#shared/contracts/jobs.ts';
import { isDatabaseAway } from '#server/db/faults.ts';
import { eventStream } from '#server/http/event-stream.ts';
import { OtherAnswer } from '#server/http/other-answer.ts';
import { jobRow } from './job-rows.ts';
import { presentProgress } from './present-job.ts';

const LOOK_MILLISECONDS = 500;
const LAST = 'ended';

/**
 * Events `progress` from the state now to the end of the job, whatever came before: a stream taken up again begins with the truth.
 * A client that heard the end is told (204) not to come again.
 */
export function streamProgress(
  em: EntityManager,
  id: string,
  lastEventId: string | string[] | undefined,
): OtherAnswer {
  if (lastEventId === LAST) return new OtherAnswer((res) => void res.status(204).end());
  return eventStream(async (send, signal) => {
    let before = '';
    while (!signal.aborted) {
      const row = await jobRow(em, id).catch((fault: unknown) => {
        if (isDatabaseAway(fault)) return undefined;
        throw fault;
      });
      if (row) {
        const data = presentProgress(row);
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
