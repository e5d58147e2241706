import type { EntityManager } from '@mikro-orm/postgresql';
import type { PublishInteraction } from '#shared/contracts/library.ts';
import { DomainError } from '#shared/errors.ts';
import type { Saving } from '#server/modules/cases/add-version.ts';
import type { ComputeContext } from '#server/modules/cases/compute-content.ts';
import type { SaveKey } from '#server/modules/cases/save-key.ts';
import { appendVersion } from './append-version.ts';
import { checkTerms } from './check-terms.ts';
import { contentHash, contentOf, interactionSearchText } from './interaction-content.ts';
import { statusNow } from './interaction-rows.ts';
import { InteractionVersion } from './interaction.entity.ts';
import { findInteraction, lockInteraction, requireCurrentInteraction } from './lock-interaction.ts';
import { claimPublishKey, findPublished } from './publish-key.ts';
import type { Published } from './publish-key.ts';
import { refusingTakenName } from './taken-name.ts';

export interface AddRequest {
  interactionId: string;
  ifMatch: string | undefined;
  key?: SaveKey | undefined;
}

async function requirePublished(em: EntityManager, id: string): Promise<void> {
  if ((await statusNow(em, id)) === 'published') return;
  throw new DomainError(
    'conflict',
    'This interaction is retired: take it back into the library first, or publish a new one.',
  );
}

/** Cases are told of every version, so one that says nothing new is refused. */
function requireChange(before: string, after: string, n: number): void {
  if (before !== after) return;
  throw new DomainError('conflict', `Nothing differs from version ${n}; change something first.`);
}

/** Publishes a version on top of the one the client started from; an interaction that has moved on meanwhile is refused as stale. */
export async function addInteractionVersion(
  context: Saving & ComputeContext,
  { interactionId, ifMatch, key }: AddRequest,
  input: PublishInteraction,
): Promise<Published> {
  const { em, actor, now } = context;
  // A retry carries the tag of before its own publication, so it is recognised before the tag is judged.
  const before = await findPublished(em, key);
  if (before) return before;
  requireCurrentInteraction(await findInteraction(em, interactionId), ifMatch);
  const content = contentOf(input, await checkTerms(input, context));
  const { name, tags } = content;
  const published = await refusingTakenName(name, () =>
    em.transactional(async (tx) => {
      const current = await lockInteraction(tx, interactionId);
      const { newestVersion, lock } = current;
      const next: Published = { interactionId, n: newestVersion + 1, lock: lock + 1 };
      if (!(await claimPublishKey(tx, key, next, now))) return undefined;
      requireCurrentInteraction(current, ifMatch);
      await requirePublished(tx, interactionId);
      const { hash } = await tx.findOneOrFail(InteractionVersion, {
        interactionId,
        n: newestVersion,
      });
      requireChange(hash, contentHash(content), newestVersion);
      const searchText = interactionSearchText(content);
      tx.assign(current, { name, tags, newestVersion: next.n, searchText, updatedAt: now });
      await tx.flush();
      const previous = { n: newestVersion, hash };
      const saving = { em: tx, actor, now };
      await appendVersion(saving, current, content, { note: input.note ?? '', previous });
      return next;
    }),
  );
  return (
    published ??
    (await findPublished(em, key)) ??
    Promise.reject(new Error('A publish key vanished.'))
  );
}
