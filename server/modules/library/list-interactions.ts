import type { EntityManager } from '@mikro-orm/postgresql';
import type { z } from 'zod';
import type { INTERACTION_SORTS, interactionListQuerySchema } from '#shared/contracts/library.ts';
import type { Condition } from '#server/modules/cases/case-resource.ts';
import { INTERACTION_COLUMNS, INTERACTION_TABLES, NEWEST_INTERACTION } from './interaction-rows.ts';
import type { InteractionRow } from './interaction-rows.ts';

export type InteractionListQuery = z.output<typeof interactionListQuerySchema>;

const ORDER: Record<(typeof INTERACTION_SORTS)[number], string> = {
  name: 'lower(i.name)',
  '-name': 'lower(i.name) desc',
  updated: 'i.updated_at, lower(i.name)',
  '-updated': 'i.updated_at desc, lower(i.name)',
};

/** Every word must be found somewhere: name, tags, description, validity, source, forms, parameters or owner. */
function wordConditions(q: string): Condition[] {
  const words = q
    .toLowerCase()
    .split(/\s+/)
    .filter((word) => word !== '');
  return words.map((word) => {
    const pattern = `%${word.replace(/[\\%_]/g, '\\$&')}%`;
    return { sql: 'i.search_text like ? or lower(o.name) like ?', params: [pattern, pattern] };
  });
}

/** A page of the library, each interaction with its newest version. */
export async function listInteractions(
  em: EntityManager,
  { q, tag, status, sort, page, pageSize }: InteractionListQuery,
): Promise<{ rows: InteractionRow[]; total: number }> {
  const conditions = wordConditions(q ?? '');
  if (tag !== undefined) conditions.push({ sql: '? = any(i.tags)', params: [tag] });
  if (status !== 'all') conditions.push({ sql: 's.status = ?', params: [status] });
  const where = [NEWEST_INTERACTION, ...conditions.map(({ sql }) => `(${sql})`)].join(' and ');
  const params = conditions.flatMap((condition) => condition.params);
  const [counted] = await em.execute<{ total: number }[]>(
    `select count(*)::integer as total from ${INTERACTION_TABLES} where ${where}`,
    params,
  );
  const rows = await em.execute<InteractionRow[]>(
    `select ${INTERACTION_COLUMNS} from ${INTERACTION_TABLES} where ${where}
     order by ${ORDER[sort]} limit ? offset ?`,
    [...params, pageSize, (page - 1) * pageSize],
  );
  return { rows, total: counted?.total ?? 0 };
}
