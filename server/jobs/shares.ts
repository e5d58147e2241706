import type { EntityManager } from '@mikro-orm/postgresql';
import { finiteJson } from '#server/http/finite-json.ts';
import { JOB_KINDS } from './kinds.ts';
import type { JobKindName } from './kinds.ts';

/** A worker without a sign of life for so long is taken for dead. */
export const SILENCE_SECONDS = 5;

/** A share of a job in the hands of one worker. Every write names its attempt, so that a worker thought dead changes nothing. */
export interface Share {
  jobId: string;
  n: number;
  /** Parts from `first` up to, not including, `end`; none for the share that finishes a job. */
  first: number;
  end: number;
  attempt: number;
  /** How many workers died or fell silent on it. */
  losses: number;
  workerId: string;
  kind: JobKindName;
  input: unknown;
}

export interface Part {
  n: number;
  contentHash: string | null;
  engine: string;
  value: unknown;
}

const HELD = 's.job_id = ? and s.n = ? and s.attempt = ? and s.worker_id = ?';
const holder = ({ jobId, n, attempt, workerId }: Share) => [jobId, n, attempt, workerId];

/**
 * Takes the next free share, or one whose worker fell silent. Jobs take turns; within one, shares go by number. Several
 * workers may claim at once: each gets another share.
 */
export async function claimShare(em: EntityManager, workerId: string): Promise<Share | undefined> {
  const [row] = await em.execute<Omit<Share, 'workerId'>[]>(
    `with free as (
       select s.job_id, s.n from job_shares s join jobs j on j.id = s.job_id
       where j.state in ('queued', 'running') and s.finished_at is null and j.kind in (?)
         and (s.worker_id is null
              or s.heartbeat_at < clock_timestamp() - make_interval(secs => ?))
         and (s.first_part < s.end_part or not exists (
           select 1 from job_shares o
           where o.job_id = s.job_id and o.n <> s.n and o.finished_at is null))
       order by j.served_at nulls first, j.created_at, s.n
       limit 1 for update of s skip locked
     ), taken as (
       update job_shares s set worker_id = ?, heartbeat_at = clock_timestamp(),
         attempt = s.attempt + 1, losses = s.losses + (s.worker_id is not null)::integer
       from free where s.job_id = free.job_id and s.n = free.n
       returning s.job_id, s.n, s.first_part, s.end_part, s.attempt, s.losses
     )
     update jobs j set state = 'running', served_at = clock_timestamp(),
       started_at = coalesce(j.started_at, clock_timestamp())
     from taken where j.id = taken.job_id and j.state in ('queued', 'running')
     returning j.id as "jobId", j.kind, j.input, taken.n, taken.first_part as first,
       taken.end_part as end, taken.attempt, taken.losses`,
    [Object.keys(JOB_KINDS), SILENCE_SECONDS, workerId],
  );
  return row && { ...row, workerId };
}

/** A share of another job that is free and whose turn comes before that of the job at hand. */
const SOMEONE_WAITS = `exists (
  select 1 from jobs o join job_shares f on f.job_id = o.id
  where o.state in ('queued', 'running') and o.id <> j.id
    and (o.served_at is null or o.served_at < j.served_at)
    and f.finished_at is null and f.worker_id is null and f.first_part < f.end_part)`;

/**
 * A sign of life. Answers `lost` when the share is no longer this worker's or its job no longer runs, and `wanted` when another job
 * waits for a turn.
 */
export async function keepShare(
  em: EntityManager,
  share: Share,
): Promise<'kept' | 'wanted' | 'lost'> {
  const [kept] = await em.execute<{ wanted: boolean }[]>(
    `update job_shares s set heartbeat_at = clock_timestamp() from jobs j
     where ${HELD} and j.id = s.job_id and j.state = 'running'
     returning ${SOMEONE_WAITS} as wanted`,
    holder(share),
  );
  if (!kept) return 'lost';
  return kept.wanted ? 'wanted' : 'kept';
}

/** Gives an unfinished share back, for another worker to take at once. */
export async function releaseShare(em: EntityManager, share: Share): Promise<void> {
  await em.execute(
    `update job_shares s set worker_id = null, heartbeat_at = null where ${HELD}`,
    holder(share),
  );
}

/** Numbers of the share's parts that are kept already. */
export async function keptParts(em: EntityManager, { jobId, first, end }: Share) {
  const rows = await em.execute<{ n: number }[]>(
    'select n from job_parts where job_id = ? and n >= ? and n < ?',
    [jobId, first, end],
  );
  return new Set(rows.map(({ n }) => n));
}

/** Parts of the same content that were computed before, whatever the job. */
export async function findParts(em: EntityManager, hashes: readonly string[]) {
  if (hashes.length === 0) return new Map<string, Omit<Part, 'n'>>();
  const rows = await em.execute<(Omit<Part, 'n'> & { contentHash: string })[]>(
    `select distinct on (content_hash) content_hash as "contentHash", engine, value
     from job_parts where content_hash in (?)`,
    [hashes],
  );
  return new Map(rows.map((row) => [row.contentHash, row]));
}

/** All values of a job in their order. */
export async function partValues(em: EntityManager, jobId: string): Promise<unknown[]> {
  const rows = await em.execute<{ value: unknown }[]>(
    'select value from job_parts where job_id = ? order by n',
    [jobId],
  );
  return rows.map(({ value }) => value);
}

/** Holds the rows of share and job until the transaction ends: of two workers ending the last two shares the second sees the first. */
async function holds(tx: EntityManager, share: Share): Promise<boolean> {
  const held = await tx.execute<unknown[]>(
    `select 1 as held from job_shares s join jobs j on j.id = s.job_id
     where ${HELD} and s.finished_at is null and j.state = 'running' for update of s, j`,
    holder(share),
  );
  return held.length > 0;
}

/**
 * Keeps parts, counts them, and with `finished` ends the share and, after the last one, its job. All or nothing; false, and
 * nothing written, when the share is no longer this worker's or its job no longer runs.
 */
export async function keepParts(
  em: EntityManager,
  share: Share,
  parts: readonly Part[],
  { finished = false, result }: { finished?: boolean; result?: unknown } = {},
): Promise<boolean> {
  return em.transactional(async (tx) => {
    if (!(await holds(tx, share))) return false;
    const rows = await tx.execute<unknown[]>(
      `insert into job_parts (job_id, n, content_hash, engine, value)
       select ?, n, "contentHash", engine, value
       from jsonb_to_recordset(?::jsonb) as x(n integer, "contentHash" text, engine text, value jsonb)
       on conflict do nothing returning 1 as made`,
      [share.jobId, finiteJson(parts)],
    );
    await tx.execute('update jobs set done = done + ? where id = ?', [rows.length, share.jobId]);
    if (finished) {
      await endShare(tx, share);
      await endJobIfLast(tx, share.jobId, result);
    }
    return true;
  });
}

async function endShare(tx: EntityManager, share: Share): Promise<void> {
  await tx.execute(
    `update job_shares s set finished_at = clock_timestamp(), worker_id = null, heartbeat_at = null
     where ${HELD}`,
    holder(share),
  );
}

async function endJobIfLast(tx: EntityManager, jobId: string, result: unknown): Promise<void> {
  await tx.execute(
    `update jobs set state = 'done', finished_at = clock_timestamp(), result = ?::jsonb
     where id = ?
       and not exists (select 1 from job_shares where job_id = ? and finished_at is null)`,
    [result === undefined ? null : finiteJson(result), jobId, jobId],
  );
}

/** Ends the job of a share that cannot be computed, unless the share is another worker's by now. */
export async function failJob(em: EntityManager, share: Share, words: string): Promise<void> {
  await em.transactional(async (tx) => {
    if (!(await holds(tx, share))) return;
    await tx.execute(
      `update jobs set state = 'failed', error = ?, finished_at = clock_timestamp() where id = ?`,
      [words, share.jobId],
    );
    await tx.execute(
      `update job_shares s set worker_id = null, heartbeat_at = null where ${HELD}`,
      holder(share),
    );
  });
}
