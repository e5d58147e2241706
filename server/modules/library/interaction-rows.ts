import type { EntityManager } from '@mikro-orm/postgresql';
import type { InteractionContent, InteractionStatus } from '#shared/contracts/library.ts';
import type { Resource } from '#server/http/can.ts';
import { utc } from '#server/modules/cases/case-rows.ts';

/** An interaction with one of its versions, as the queries below give it. */
export interface InteractionRow {
  id: string;
  lock: number;
  newestVersion: number;
  createdAt: string;
  updatedAt: string;
  ownerId: string;
  ownerName: string;
  status: InteractionStatus;
  reason: string;
  statusAt: string;
  statusById: string;
  statusByName: string;
  content: InteractionContent;
  n: number;
  hash: string;
  note: string;
  savedAt: string;
  authorId: string;
  authorName: string;
}

export const INTERACTION_COLUMNS = `i.id, i.lock, i.newest_version as "newestVersion",
  ${utc('i.created_at')} as "createdAt", ${utc('i.updated_at')} as "updatedAt",
  o.id as "ownerId", o.name as "ownerName",
  s.status, s.reason, ${utc('s.created_at')} as "statusAt", b.id as "statusById", b.name as "statusByName",
  v.content, v.n, v.hash, v.note, ${utc('v.created_at')} as "savedAt",
  a.id as "authorId", a.name as "authorName"`;

/** Interactions with their versions; the newest row of statuses counts. */
export const INTERACTION_TABLES = `interactions i
  join accounts o on o.id = i.owner_id
  join interaction_versions v on v.interaction_id = i.id
  join accounts a on a.id = v.author_id
  join lateral (select t.status, t.reason, t.created_at, t.actor_id from interaction_statuses t
    where t.interaction_id = i.id order by t.id desc limit 1) s on true
  join accounts b on b.id = s.actor_id`;
export const NEWEST_INTERACTION = 'v.n = i.newest_version';

/** An interaction as `can` judges it: its owner is who published it first. */
export interface InteractionResource extends Resource {
  id: string;
}

export async function loadInteraction(
  em: EntityManager,
  id: string,
): Promise<InteractionResource | undefined> {
  const [row] = await em.execute<InteractionResource[]>(
    'select id, owner_id as "ownerId" from interactions where id = ?',
    [id],
  );
  return row;
}

/** An interaction with its newest version, or with version n; undefined where there is none. */
export async function interactionRow(
  em: EntityManager,
  id: string,
  n?: number,
): Promise<InteractionRow | undefined> {
  const which = n === undefined ? NEWEST_INTERACTION : 'v.n = ?';
  const [row] = await em.execute<InteractionRow[]>(
    `select ${INTERACTION_COLUMNS} from ${INTERACTION_TABLES} where i.id = ? and ${which}`,
    n === undefined ? [id] : [id, n],
  );
  return row;
}

export async function statusNow(em: EntityManager, id: string): Promise<InteractionStatus> {
  const [row] = await em.execute<{ status: InteractionStatus }[]>(
    `select status from interaction_statuses where interaction_id = ? order by id desc limit 1`,
    [id],
  );
  if (!row) throw new Error(`The interaction ${id} has no status.`);
  return row.status;
}
