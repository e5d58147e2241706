import { LockMode } from '@mikro-orm/core';
import type { EntityManager } from '@mikro-orm/postgresql';
import { DomainError } from '#shared/errors.ts';
import { Case } from './case.entity.ts';
import { etagOf, matchesLock } from './etag.ts';

/** Refuses a change that started from an older state, and says which state there is now; nothing of it is stored or overwritten. */
export function requireCurrent(
  { newestVersion, lock }: Pick<Case, 'newestVersion' | 'lock'>,
  ifMatch: string | undefined,
): void {
  if (matchesLock(ifMatch, lock)) return;
  throw new DomainError(
    'staleVersion',
    `The case has changed since you opened it; its newest version is ${newestVersion}. Your work was not saved and nothing was overwritten: compare with version ${newestVersion}, then save again.`,
    { extra: { currentVersion: newestVersion, currentEtag: etagOf(lock) } },
  );
}

export function findCase(em: EntityManager, id: string): Promise<Case> {
  return em.findOneOrFail(Case, { id }, { refresh: true });
}

/** The case, held until the transaction ends: of two saves at once the second waits here and then sees the first. */
export function lockCase(em: EntityManager, id: string): Promise<Case> {
  return em.findOneOrFail(Case, { id }, { lockMode: LockMode.PESSIMISTIC_WRITE, refresh: true });
}
