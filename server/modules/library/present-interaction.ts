import type {
  InteractionDetail,
  InteractionHead,
  InteractionItem,
  InteractionVersion,
} from '#shared/contracts/library.ts';
import type { Actor } from '#server/http/actor.ts';
import { can } from '#server/http/can.ts';
import { describeTerms } from './interaction-content.ts';
import type { InteractionRow } from './interaction-rows.ts';

function headOf(row: InteractionRow): InteractionHead {
  const { n, hash, note, savedAt: createdAt, authorId, authorName } = row;
  return { n, hash, note, createdAt, author: { id: authorId, name: authorName } };
}

function stateOf(row: InteractionRow) {
  const by = { id: row.statusById, name: row.statusByName };
  return {
    id: row.id,
    status: row.status,
    retired: row.status === 'retired' ? { reason: row.reason, by, at: row.statusAt } : null,
    owner: { id: row.ownerId, name: row.ownerName },
    createdAt: row.createdAt,
    updatedAt: row.updatedAt,
    summary: describeTerms(row.content.terms),
    version: headOf(row),
  };
}

export function presentInteractionItem(row: InteractionRow): InteractionItem {
  const { name, description, validity, source, tags } = row.content;
  return { ...stateOf(row), name, description, validity, source, tags };
}

/** The only way a version of an interaction leaves the server. */
export function presentInteractionVersion(row: InteractionRow, actor: Actor): InteractionVersion {
  const resource = { ownerId: row.ownerId };
  return {
    ...row.content,
    ...stateOf(row),
    newestVersion: row.newestVersion,
    may: {
      publish: can(actor, 'interaction.publish', resource),
      retire: can(actor, 'interaction.retire', resource),
    },
  };
}

export function presentInteraction(
  row: InteractionRow,
  versions: InteractionHead[],
  actor: Actor,
): InteractionDetail {
  return { ...presentInteractionVersion(row, actor), versions };
}
