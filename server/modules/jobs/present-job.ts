import type { Job, JobProgress } from '#shared/contracts/jobs.ts';
import type { JobRow } from './job-rows.ts';

/** By the mean pace so far; a pace that nobody keeps up is none. */
function secondsLeft({ state, done, total, seconds, workers }: JobRow): number | null {
  if (state !== 'running' || done === 0 || seconds === null || workers === 0) return null;
  return Math.round(((seconds / done) * (total - done) + Number.EPSILON) * 10) / 10;
}

export function presentProgress(row: JobRow): JobProgress {
  const { id, state, done, total, error, workers } = row;
  return { id, state, done, total, secondsLeft: secondsLeft(row), workers, error };
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
