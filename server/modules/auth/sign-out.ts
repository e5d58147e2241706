import type { VerbContext } from '#server/http/context.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import { endSession } from './end-sessions.ts';

/** Ends the session in the database: a copy of its cookies is worth nothing afterwards. */
export async function signOut({ em, actor, now }: VerbContext): Promise<void> {
  const { credential } = actor;
  if (credential.kind !== 'session') return;
  const id = credential.sessionId;
  await em.transactional(async (tx) => {
    await endSession(tx, id, 'signedOut', now);
    recordTrail(tx, { actor, action: 'session.signOut', subject: { type: 'session', id }, now });
  });
}
