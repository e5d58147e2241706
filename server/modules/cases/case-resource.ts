import type { EntityManager } from '@mikro-orm/postgresql';
import { PERMISSIONS } from '#shared/roles.ts';
import type { Action } from '#shared/roles.ts';
import type { Actor } from '#server/http/actor.ts';
import type { Resource } from '#server/http/can.ts';

/** A case as `can` judges it. */
export interface CaseResource extends Resource {
  id: string;
  memberIds: string[];
}

export async function loadCase(em: EntityManager, id: string): Promise<CaseResource | undefined> {
  const [row] = await em.execute<CaseResource[]>(
    `select c.id, c.owner_id as "ownerId",
       array(select m.account_id::text from campaign_members m
             where m.campaign_id = c.campaign_id) as "memberIds"
     from cases c where c.id = ?`,
    [id],
  );
  return row;
}

export interface Condition {
  sql: string;
  params: unknown[];
}

/** The same judgement as `can`, for many cases at once: a condition on the table `cases c`, read from the one table of permissions. */
export function reachedBy(actor: Pick<Actor, 'id' | 'role'>, action: Action): Condition {
  const own: Condition = { sql: 'c.owner_id = ?', params: [actor.id] };
  switch (PERMISSIONS[actor.role][action]) {
    case 'any':
      return { sql: 'true', params: [] };
    case 'own':
      return own;
    case 'involved':
      return {
        sql: `(${own.sql} or exists (select 1 from campaign_members m
                where m.campaign_id = c.campaign_id and m.account_id = ?))`,
        params: [actor.id, actor.id],
      };
    case 'none':
      return { sql: 'false', params: [] };
  }
}
