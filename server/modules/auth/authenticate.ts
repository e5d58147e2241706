import { DomainError } from '#shared/errors.ts';
import type { Actor } from '#server/http/actor.ts';
import type { RequestContext } from '#server/http/context.ts';
import { cookieNames, readCookies } from '#server/http/cookies.ts';
import { usePersonalToken } from '#server/modules/tokens/use-personal-token.ts';
import type { Account } from '#server/modules/users/account.entity.ts';
import { actorOf, findAccount } from '#server/modules/users/find-account.ts';
import { demoAccountsUsable } from './demo-gate.ts';
import { clearSessionCookies, isLive } from './issue-session.ts';
import { renewSession } from './renew-session.ts';
import { Session } from './session.entity.ts';
import { readSessionToken } from './session-token.ts';

const SEEN_EVERY_MILLISECONDS = 60_000;

function usable(account: Account | null, { config, headers }: RequestContext): account is Account {
  return (
    account !== null && account.active && (!account.demo || demoAccountsUsable(config, headers))
  );
}

async function liveSession(context: RequestContext): Promise<Session | undefined> {
  const { em, now, config } = context;
  const names = cookieNames(config.https);
  const cookies = readCookies(context.headers['cookie']);
  const named = readSessionToken(cookies[names.session], config.signingKey, now);
  if (!named) return renewSession(context, cookies[names.renewal]);
  const session = await em.findOne(Session, { id: named.sessionId, accountId: named.accountId });
  return session && isLive(session, now) ? session : undefined;
}

async function bySession(context: RequestContext): Promise<Actor> {
  const { em, now } = context;
  const session = await liveSession(context);
  const account = session ? await findAccount(em, session.accountId) : null;
  if (!session || !usable(account, context)) {
    if (context.headers['cookie'] !== undefined) clearSessionCookies(context);
    throw new DomainError('unauthenticated', 'Sign in to go on, or send a personal token.');
  }
  const seen = new Date(now.getTime() - SEEN_EVERY_MILLISECONDS);
  if (session.lastSeenAt < seen) {
    await em.nativeUpdate(
      Session,
      { id: session.id, lastSeenAt: { $lt: seen } },
      { lastSeenAt: now },
    );
  }
  return actorOf(account, { kind: 'session', sessionId: session.id });
}

async function byToken(context: RequestContext, header: string): Promise<Actor> {
  const { em, now } = context;
  const secret = /^Bearer +(\S+)$/i.exec(header)?.[1];
  const token = secret === undefined ? undefined : await usePersonalToken({ em, now }, secret);
  const account = token ? await findAccount(em, token.accountId) : null;
  if (!token || !usable(account, context)) {
    throw new DomainError(
      'unauthenticated',
      'This personal token is unknown, expired or withdrawn; send `Authorization: Bearer TOKEN`.',
    );
  }
  return actorOf(account, { kind: 'token', tokenId: token.id, mayWrite: token.scope === 'write' });
}

/** Who asks: the owner of a live session or of a valid personal token. A token given is the only one looked at. */
export function authenticate(context: RequestContext): Promise<Actor> {
  const header = context.headers['authorization'];
  return typeof header === 'string' ? byToken(context, header) : bySession(context);
}
