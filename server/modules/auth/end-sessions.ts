import type { EntityManager } from '@mikro-orm/postgresql';
import { LONGEST_MILLISECONDS } from './issue-session.ts';
import { Session } from './session.entity.ts';

export type EndReason = 'signedOut' | 'passwordChanged' | 'deactivated' | 'renewalReused';

export async function endSession(
  em: EntityManager,
  id: string,
  reason: EndReason,
  now: Date,
): Promise<void> {
  await em.nativeUpdate(Session, { id, endedAt: null }, { endedAt: now, endReason: reason });
}

/** Ends every session of an account, or every other than `except`. */
export async function endSessionsOf(
  em: EntityManager,
  accountId: string,
  { reason, now, except }: { reason: EndReason; now: Date; except?: string },
): Promise<void> {
  await em.nativeUpdate(
    Session,
    { accountId, endedAt: null, ...(except !== undefined && { id: { $ne: except } }) },
    { endedAt: now, endReason: reason },
  );
}

/** Removes the sessions, and with them the renewal tokens, that have been of no use for a month. */
export async function forgetOldSessions(em: EntityManager, now: Date): Promise<void> {
  const before = new Date(now.getTime() - LONGEST_MILLISECONDS - 30 * 24 * 3_600_000);
  await em.nativeDelete(Session, { createdAt: { $lt: before } });
}
