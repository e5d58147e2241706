import type { EntityManager } from '@mikro-orm/postgresql';
import { Account } from './account.entity.ts';

export interface UserQuery {
  page: number;
  pageSize: number;
  q?: string | undefined;
}

/** Accounts whose name or address holds the text, by name. */
export function listUsers(
  em: EntityManager,
  { page, pageSize, q }: UserQuery,
): Promise<[Account[], number]> {
  const text = q?.trim() ?? '';
  const like = `%${text.replace(/[\\%_]/g, '\\$&')}%`;
  return em.findAndCount(
    Account,
    text === '' ? {} : { $or: [{ name: { $ilike: like } }, { email: { $ilike: like } }] },
    { orderBy: { name: 'asc', id: 'asc' }, limit: pageSize, offset: (page - 1) * pageSize },
  );
}
