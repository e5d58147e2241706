import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/postgresql';
import { cookieLine, cookieNames } from '#server/http/cookies.ts';
import type { RequestContext } from '#server/http/context.ts';
import { Renewal, Session } from './session.entity.ts';
import { hashSecret, newSecret, signSessionToken } from './session-token.ts';

export const IDLE_MILLISECONDS = 12 * 3_600_000;
export const LONGEST_MILLISECONDS = 7 * 24 * 3_600_000;

type CookieContext = Pick<RequestContext, 'config' | 'now' | 'addCookie'>;

export function isLive(session: Session, now: Date): boolean {
  return (
    !session.endedAt &&
    now.getTime() - session.lastSeenAt.getTime() < IDLE_MILLISECONDS &&
    now.getTime() - session.createdAt.getTime() < LONGEST_MILLISECONDS
  );
}

/** Hands the browser the two cookies of a session: the short signed one and the one that renews it. */
export function setSessionCookies(
  { config, now, addCookie }: CookieContext,
  session: Pick<Session, 'id' | 'accountId' | 'createdAt'>,
  renewal: string,
): void {
  const names = cookieNames(config.https);
  const left = session.createdAt.getTime() + LONGEST_MILLISECONDS - now.getTime();
  const options = { https: config.https, seconds: left / 1000 };
  const named = { accountId: session.accountId, sessionId: session.id };
  const token = signSessionToken(named, config.signingKey, now);
  addCookie(cookieLine(names.session, token, options));
  addCookie(cookieLine(names.renewal, renewal, options));
}

export function clearSessionCookies({ config, addCookie }: CookieContext): void {
  const options = { https: config.https, seconds: 0 };
  for (const name of Object.values(cookieNames(config.https))) {
    addCookie(cookieLine(name as string, '', options));
  }
}

/** A further renewal token of a session; returns the secret, of which only the hash is kept. */
export function addRenewal(em: EntityManager, session: Session, now: Date): string {
  const secret = newSecret();
  em.create(
    Renewal,
    { id: randomUUID(), session, tokenHash: hashSecret(secret), createdAt: now, usedAt: null },
    { persist: true },
  );
  return secret;
}

export function createSession(em: EntityManager, accountId: string, now: Date): Session {
  return em.create(
    Session,
    {
      id: randomUUID(),
      accountId,
      createdAt: now,
      lastSeenAt: now,
      endedAt: null,
      endReason: null,
    },
    { persist: true },
  );
}
