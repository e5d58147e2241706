import type { EntityManager } from '@mikro-orm/postgresql';
import type { z } from 'zod';
import type { CASE_SORTS, caseListQuerySchema } from '#shared/contracts/cases.ts';
import type { Actor } from '#server/http/actor.ts';
import { CASE_COLUMNS, CASE_TABLES, NEWEST, statusOf } from './case-rows.ts';
import type { CaseRow } from './case-rows.ts';
import { reachedBy } from './case-resource.ts';
import type { Condition } from './case-resource.ts';

export type CaseListQuery = z.output<typeof caseListQuerySchema>;

const ORDER: Record<(typeof CASE_SORTS)[number], string> = {
  number: 'c.number',
  '-number': 'c.number desc',
  title: 'lower(c.title), c.number',
  '-title': 'lower(c.title) desc, c.number desc',
  updated: 'c.updated_at, c.number',
  '-updated': 'c.updated_at desc, c.number desc',
};

/** Every word must be found somewhere: title, tags, beam line, forms, owner or campaign; `42` and `#42` also as the number. */
function searchConditions(q: string): Condition[] {
  const words = q
    .toLowerCase()
    .split(/\s+/)
    .filter((word) => word !== '');
  return words.map((word) => {
    const pattern = `%${word.replace(/[\\%_]/g, '\\$&')}%`;
    const number = /^#?(\d{1,9})$/.exec(word)?.[1];
    if (number !== undefined && word.startsWith('#')) {
      return { sql: 'c.number = ?', params: [Number(number)] };
    }
    const places = ['c.search_text', 'lower(o.name)', `lower(coalesce(g.name, ''))`];
    const condition = {
      sql: places.map((place) => `${place} like ?`).join(' or '),
      params: places.map((): unknown => pattern),
    };
    return number === undefined
      ? condition
      : { sql: `${condition.sql} or c.number = ?`, params: [...condition.params, Number(number)] };
  });
}

function conditionsOf(actor: Pick<Actor, 'id' | 'role'>, query: CaseListQuery): Condition[] {
  const { q, status, tag, campaign, owner } = query;
  const conditions = [reachedBy(actor, 'case.read'), ...searchConditions(q ?? '')];
  if (status !== undefined) conditions.push({ sql: `${statusOf('v.id')} = ?`, params: [status] });
  if (tag !== undefined) conditions.push({ sql: '? = any(c.tags)', params: [tag] });
  if (campaign !== undefined) {
    conditions.push({ sql: 'c.campaign_id::text = ?', params: [campaign] });
  }
  if (owner === 'me') conditions.push({ sql: 'c.owner_id = ?', params: [actor.id] });
  return conditions;
}

/** The page of cases the actor may read: decided by the database before paging, so that totals and pages tell nothing of others. */
export async function listCases(
  em: EntityManager,
  actor: Pick<Actor, 'id' | 'role'>,
  query: CaseListQuery,
): Promise<{ rows: CaseRow[]; total: number }> {
  const conditions = conditionsOf(actor, query);
  const where = conditions.map(({ sql }) => `(${sql})`).join(' and ');
  const params = conditions.flatMap((condition) => condition.params);
  const [counted] = await em.execute<{ total: number }[]>(
    `select count(*)::integer as total from ${CASE_TABLES} where ${NEWEST} and ${where}`,
    params,
  );
  const rows = await em.execute<CaseRow[]>(
    `select ${CASE_COLUMNS} from ${CASE_TABLES} where ${NEWEST} and ${where}
     order by ${ORDER[query.sort]} limit ? offset ?`,
    [...params, query.pageSize, (query.page - 1) * query.pageSize],
  );
  return { rows, total: counted?.total ?? 0 };
}
