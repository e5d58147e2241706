import type { EntityManager } from '@mikro-orm/postgresql';
import type { JobState } from '#shared/contracts/jobs.ts';
import { PERMISSIONS } from '#shared/roles.ts';
import type { Actor } from '#server/http/actor.ts';
import type { Resource } from '#server/http/can.ts';
import { LIVING_WORKERS } from '#server/jobs/living-workers.ts';

/** A job with what its readers see of it. */
export interface JobRow {
  id: string;
  kind: string;
  title: string;
  ownerId: string;
  ownerName: string;
  state: JobState;
  done: number;
  total: number;
  error: string | null;
  createdAt: string;
  startedAt: string | null;
  finishedAt: string | null;
  /** Seconds since it was started; null before. */
  seconds: number | null;
  workers: number;
}

export interface JobResource extends Resource {
  id: string;
  kind: string;
}

function utc(column: string): string {
  return `to_char(${column} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"')`;
}

const COLUMNS = `j.id, j.kind, j.title, j.owner_id as "ownerId", o.name as "ownerName", j.state, j.done,
  j.total, j.error, ${utc('j.created_at')} as "createdAt", ${utc('j.started_at')} as "startedAt",
  ${utc('j.finished_at')} as "finishedAt",
  extract(epoch from coalesce(j.finished_at, clock_timestamp()) - j.started_at)::double precision as seconds,
  ${LIVING_WORKERS} as workers`;
const TABLES = 'jobs j join accounts o on o.id = j.owner_id';

/** A job as `can` judges it; one of another kind than asked for is not found. */
export async function loadJob(
  em: EntityManager,
  id: string,
  kind?: string,
): Promise<JobResource | undefined> {
  const [row] = await em.execute<(JobResource & { memberIds: string[] })[]>(
    `select j.id, j.kind, j.owner_id as "ownerId",
       array(select m.account_id::text from campaign_members m
             where m.campaign_id = j.campaign_id) as "memberIds"
     from jobs j where j.id = ?`,
    [id],
  );
  return row && (kind === undefined || row.kind === kind) ? row : undefined;
}

export async function jobRow(em: EntityManager, id: string): Promise<JobRow> {
  const [row] = await em.execute<JobRow[]>(`select ${COLUMNS} from ${TABLES} where j.id = ?`, [id]);
  if (!row) throw new Error(`Job ${id} was there a moment ago.`);
  return row;
}

/** The same judgement as `can` for many jobs at once. */
function reached(actor: Pick<Actor, 'id' | 'role'>): { sql: string; params: string[] } {
  switch (PERMISSIONS[actor.role]['job.read']) {
    case 'any':
      return { sql: 'true', params: [] };
    case 'involved':
      return {
        sql: `(j.owner_id = ? or exists (select 1 from campaign_members m
                where m.campaign_id = j.campaign_id and m.account_id = ?))`,
        params: [actor.id, actor.id],
      };
    case 'own':
      return { sql: 'j.owner_id = ?', params: [actor.id] };
    case 'none':
      return { sql: 'false', params: [] };
  }
}

export interface JobListQuery {
  page: number;
  pageSize: number;
  active: boolean;
  kind: string | undefined;
}

/** Jobs the actor may read, newest first. */
export async function listJobs(
  em: EntityManager,
  actor: Pick<Actor, 'id' | 'role'>,
  { page, pageSize, active, kind }: JobListQuery,
): Promise<{ rows: JobRow[]; total: number }> {
  const conditions = [reached(actor)];
  if (active) conditions.push({ sql: `j.state in ('queued', 'running')`, params: [] });
  if (kind !== undefined) conditions.push({ sql: 'j.kind = ?', params: [kind] });
  const where = conditions.map(({ sql }) => sql).join(' and ');
  const params = conditions.flatMap((condition) => condition.params);
  const [counted] = await em.execute<{ total: number }[]>(
    `select count(*)::integer as total from jobs j where ${where}`,
    params,
  );
  const rows = await em.execute<JobRow[]>(
    `select ${COLUMNS} from ${TABLES} where ${where}
     order by j.created_at desc, j.id limit ? offset ?`,
    [...params, pageSize, (page - 1) * pageSize],
  );
  return { rows, total: counted?.total ?? 0 };
}
