import type { InteractionStatus } from '#shared/contracts/library.ts';
import { DomainError } from '#shared/errors.ts';
import type { VerbContext } from '#server/http/context.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import { statusNow } from './interaction-rows.ts';
import { InteractionStatusRow } from './interaction.entity.ts';
import { lockInteraction, requireCurrentInteraction } from './lock-interaction.ts';

const ALREADY: Record<InteractionStatus, string> = {
  retired: 'This interaction is retired already.',
  published: 'This interaction is in the library; there is nothing to take back.',
};

/** Retires an interaction, or takes a retired one back. Its versions stay, and so do the cases that cite them. */
export async function setInteractionStatus(
  { em, actor, now }: VerbContext,
  { id, ifMatch }: { id: string; ifMatch: string | undefined },
  { status, reason }: { status: InteractionStatus; reason: string },
): Promise<void> {
  await em.transactional(async (tx) => {
    const current = await lockInteraction(tx, id);
    if (ifMatch !== undefined) requireCurrentInteraction(current, ifMatch);
    const before = await statusNow(tx, id);
    if (before === status) throw new DomainError('conflict', ALREADY[status]);
    tx.create(
      InteractionStatusRow,
      { interactionId: id, status, actorId: actor.id, reason, createdAt: now },
      { persist: true },
    );
    current.updatedAt = now;
    recordTrail(tx, {
      actor,
      action: status === 'retired' ? 'interaction.retire' : 'interaction.reinstate',
      subject: { type: 'interaction', id },
      before: { name: current.name, status: before },
      after: { name: current.name, status, reason },
      now,
    });
  });
}
