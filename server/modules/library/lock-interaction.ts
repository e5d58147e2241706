import { LockMode } from '@mikro-orm/core';
import type { EntityManager } from '@mikro-orm/postgresql';
import { DomainError } from '#shared/errors.ts';
import { etagOf, matchesLock } from '#server/modules/cases/etag.ts';
import { Interaction } from './interaction.entity.ts';

/** Refuses a change that started from an older state, and says which state there is now. */
export function requireCurrentInteraction(
  { newestVersion, lock }: Pick<Interaction, 'newestVersion' | 'lock'>,
  ifMatch: string | undefined,
): void {
  if (matchesLock(ifMatch, lock, 'the interaction')) return;
  throw new DomainError(
    'staleVersion',
    `The interaction has changed since you opened it; its newest version is ${newestVersion}. Nothing was published and nothing was overwritten: compare with version ${newestVersion}, then publish again.`,
    { extra: { currentVersion: newestVersion, currentEtag: etagOf(lock) } },
  );
}

export function findInteraction(em: EntityManager, id: string): Promise<Interaction> {
  return em.findOneOrFail(Interaction, { id }, { refresh: true });
}

/** The interaction, held until the transaction ends: of two changes at once the second waits here and then sees the first. */
export function lockInteraction(em: EntityManager, id: string): Promise<Interaction> {
  return em.findOneOrFail(
    Interaction,
    { id },
    { lockMode: LockMode.PESSIMISTIC_WRITE, refresh: true },
  );
}
