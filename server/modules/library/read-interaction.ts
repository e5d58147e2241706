import type { EntityManager } from '@mikro-orm/postgresql';
import type { InteractionHead } from '#shared/contracts/library.ts';
import { DomainError } from '#shared/errors.ts';
import { utc } from '#server/modules/cases/case-rows.ts';
import { interactionRow } from './interaction-rows.ts';
import type { InteractionRow } from './interaction-rows.ts';

/** An interaction at its newest version, or at version n. */
export async function readInteraction(
  em: EntityManager,
  id: string,
  n?: number,
): Promise<InteractionRow> {
  const row = await interactionRow(em, id, n);
  if (row) return row;
  throw new DomainError(
    'notFound',
    n === undefined ? 'Not found.' : `This interaction has no version ${n}.`,
  );
}

interface HeadRow extends Omit<InteractionHead, 'author'> {
  authorId: string;
  authorName: string;
}

/** Heads of every version, newest first; an interaction has few. */
export async function interactionHeads(em: EntityManager, id: string): Promise<InteractionHead[]> {
  const rows = await em.execute<HeadRow[]>(
    `select v.n, v.hash, v.note, ${utc('v.created_at')} as "createdAt",
       a.id as "authorId", a.name as "authorName"
     from interaction_versions v join accounts a on a.id = v.author_id
     where v.interaction_id = ? order by v.n desc`,
    [id],
  );
  return rows.map(({ authorId, authorName, ...head }) => ({
    ...head,
    author: { id: authorId, name: authorName },
  }));
}
