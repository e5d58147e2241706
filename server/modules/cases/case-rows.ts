import type { EntityManager } from '@mikro-orm/postgresql';
import type { Status } from '#shared/contracts/cases.ts';
import type { Summary } from '#server/documents/summarise.ts';

/** A case with one of its versions, as the queries below give it. */
export interface CaseRow {
  id: string;
  number: number;
  title: string;
  tags: string[];
  lock: number;
  createdAt: string;
  summary: Summary;
  ownerId: string;
  ownerName: string;
  campaignId: string | null;
  campaignName: string | null;
  releasedVersion: number | null;
  n: number;
  hash: string;
  note: string;
  savedAt: string;
  authorId: string;
  authorName: string;
  status: Status;
}

/** RFC 3339 in UTC, made by the database so that no driver setting can change it. */
export function utc(column: string): string {
  return `to_char(${column} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"')`;
}

/** The newest row of statuses counts. */
export function statusOf(version: string): string {
  return `(select s.status from version_statuses s where s.version_id = ${version}
           order by s.id desc limit 1)`;
}

export const CASE_COLUMNS = `c.id, c.number, c.title, c.tags, c.lock, c.summary,
  ${utc('c.created_at')} as "createdAt",
  o.id as "ownerId", o.name as "ownerName", g.id as "campaignId", g.name as "campaignName",
  (select max(r.n) from case_versions r
   where r.case_id = c.id and ${statusOf('r.id')} = 'released') as "releasedVersion",
  v.n, v.hash, v.note, ${utc('v.created_at')} as "savedAt",
  a.id as "authorId", a.name as "authorName", ${statusOf('v.id')} as status`;

/** Cases with their newest version; people and campaigns are only looked up for their names. */
export const CASE_TABLES = `cases c
  join accounts o on o.id = c.owner_id
  left join campaigns g on g.id = c.campaign_id
  join case_versions v on v.case_id = c.id
  join accounts a on a.id = v.author_id`;
export const NEWEST = 'v.n = c.newest_version';

/** A case with its newest version, or with version n where an answer is about that one. */
export async function caseRow(em: EntityManager, id: string, n?: number): Promise<CaseRow> {
  const which = n === undefined ? NEWEST : 'v.n = ?';
  const [row] = await em.execute<CaseRow[]>(
    `select ${CASE_COLUMNS} from ${CASE_TABLES} where c.id = ? and ${which}`,
    n === undefined ? [id] : [id, n],
  );
  if (!row) throw new Error(`Case ${id} was there a moment ago.`);
  return row;
}
