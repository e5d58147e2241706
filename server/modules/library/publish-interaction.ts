import { randomUUID } from 'node:crypto';
import type { PublishInteraction } from '#shared/contracts/library.ts';
import type { Saving } from '#server/modules/cases/add-version.ts';
import type { ComputeContext } from '#server/modules/cases/compute-content.ts';
import type { SaveKey } from '#server/modules/cases/save-key.ts';
import { appendVersion } from './append-version.ts';
import { checkTerms } from './check-terms.ts';
import { contentOf, interactionSearchText } from './interaction-content.ts';
import { Interaction, InteractionStatusRow } from './interaction.entity.ts';
import { claimPublishKey, findPublished } from './publish-key.ts';
import type { Published } from './publish-key.ts';
import { refusingTakenName } from './taken-name.ts';

/** Publishes an interaction as its version 1, once a case with it can be computed. `id` is chosen here unless a seeder knows it. */
export async function publishInteraction(
  context: Saving & ComputeContext,
  input: PublishInteraction,
  { key, id = randomUUID() }: { key?: SaveKey | undefined; id?: string } = {},
): Promise<Published> {
  const { em, actor, now } = context;
  const before = await findPublished(em, key);
  if (before) return before;
  const content = contentOf(input, await checkTerms(input, context));
  const published: Published = { interactionId: id, n: 1, lock: 1 };
  const { name, tags } = content;
  const kept = await refusingTakenName(name, () =>
    em.transactional(async (tx) => {
      if (!(await claimPublishKey(tx, key, published, now))) return false;
      const created = tx.create(
        Interaction,
        {
          id,
          name,
          tags,
          ownerId: actor.id,
          newestVersion: published.n,
          searchText: interactionSearchText(content),
          createdAt: now,
          updatedAt: now,
        },
        { persist: true },
      );
      // The rows refer to each other by plain identifiers, so their order is ours to keep.
      await tx.flush();
      tx.create(
        InteractionStatusRow,
        { interactionId: id, status: 'published', actorId: actor.id, reason: '', createdAt: now },
        { persist: true },
      );
      await appendVersion({ em: tx, actor, now }, created, content, { note: input.note ?? '' });
      return true;
    }),
  );
  return kept ? published : ((await findPublished(em, key)) ?? published);
}
