import { randomUUID } from 'node:crypto';
import type { InteractionContent } from '#shared/contracts/library.ts';
import type { Saving } from '#server/modules/cases/add-version.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import { contentHash } from './interaction-content.ts';
import { InteractionVersion } from './interaction.entity.ts';
import type { Interaction } from './interaction.entity.ts';

/** Appends the version that the interaction now points to, and writes the trail; within the caller's transaction. */
export async function appendVersion(
  { em, actor, now }: Saving,
  { id, newestVersion: n }: Pick<Interaction, 'id' | 'newestVersion'>,
  content: InteractionContent,
  { note, previous }: { note: string; previous?: { n: number; hash: string } },
): Promise<void> {
  const hash = contentHash(content);
  em.create(
    InteractionVersion,
    {
      id: randomUUID(),
      interactionId: id,
      n,
      content,
      hash,
      authorId: actor.id,
      note,
      createdAt: now,
    },
    { persist: true },
  );
  recordTrail(em, {
    actor,
    action: previous ? 'interaction.addVersion' : 'interaction.publish',
    subject: { type: 'interaction', id },
    ...(previous && { before: { ...previous } }),
    after: { name: content.name, n, hash, tags: content.tags, note },
    now,
  });
  await em.flush();
}
