import type { RequestContext } from '#server/http/context.ts';
import { findAccount } from '#server/modules/users/find-account.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import { endSession } from './end-sessions.ts';
import { addRenewal, isLive, setSessionCookies } from './issue-session.ts';
import { Renewal, Session } from './session.entity.ts';
import { hashSecret } from './session-token.ts';

/** Two tabs may renew at once, and an answer may be lost: so long a used token is still believed. */
const TOLERANCE_MILLISECONDS = 30_000;

async function revokeFamily(context: RequestContext, session: Session): Promise<void> {
  const { em, now } = context;
  const account = await findAccount(em, session.accountId);
  await em.transactional(async (tx) => {
    await endSession(tx, session.id, 'renewalReused', now);
    recordTrail(tx, {
      actor: {
        id: session.accountId,
        name: account?.name ?? 'unknown',
        credential: { kind: 'session' },
      },
      action: 'session.renewalReused',
      subject: { type: 'session', id: session.id },
      after: { address: context.address },
      now,
    });
  });
}

/**
 * The session a renewal token belongs to, with fresh cookies for the browser. A token is used once; seen again
 * after the tolerance, someone has a copy, and the whole family of the session is revoked.
 */
export async function renewSession(
  context: RequestContext,
  secret: string | undefined,
): Promise<Session | undefined> {
  if (secret === undefined || secret === '') return undefined;
  const { em, now } = context;
  const tokenHash = hashSecret(secret);
  const renewal = await em.findOne(Renewal, { tokenHash }, { populate: ['session'] });
  const session = renewal?.session;
  if (!renewal || !session || !isLive(session, now)) return undefined;
  const fresh = await em.transactional(async (tx) => {
    const first = await tx.nativeUpdate(Renewal, { id: renewal.id, usedAt: null }, { usedAt: now });
    if (first === 0) {
      await tx.refresh(renewal);
      const used = renewal.usedAt?.getTime() ?? 0;
      if (now.getTime() - used > TOLERANCE_MILLISECONDS) return undefined;
    }
    return addRenewal(tx, tx.getReference(Session, session.id), now);
  });
  if (fresh === undefined) {
    await revokeFamily(context, session);
    return undefined;
  }
  setSessionCookies(context, session, fresh);
  return session;
}
