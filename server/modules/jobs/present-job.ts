import type { Job, JobProgress } from '#shared/contracts/jobs.ts';
import type { JobRow } from './job-rows.ts';

/** Parts done within so many seconds. */
export interface Pace {
  done: number;
  seconds: number;
}

/** A pace that nobody keeps up is none. */
function secondsLeft({ state, done, total, workers }: JobRow, pace: Pace): number | null {
  if (state !== 'running' || workers === 0 || !(pace.done > 0 && pace.seconds > 0)) return null;
  return Math.round((pace.seconds / pace.done) * (total - done) * 10) / 10;
}

/** Time left by the pace someone has seen, or by the mean one since the start. */
export function presentProgress(row: JobRow, seen?: Pace): JobProgress {
  const { id, state, done, total, error, workers } = row;
  const pace = seen ?? { done, seconds: row.seconds ?? 0 };
  return { id, state, done, total, secondsLeft: secondsLeft(row, pace), workers, error };
}

/** The only way a job leaves the server. */
export function presentJob(row: JobRow): Job {
  return {
    ...presentProgress(row),
    kind: row.kind,
    title: row.title,
    owner: { id: row.ownerId, name: row.ownerName },
    createdAt: row.createdAt,
    startedAt: row.startedAt,
    finishedAt: row.finishedAt,
  };
}
