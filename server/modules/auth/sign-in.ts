import type { z } from 'zod';
import type { signInSchema } from '#shared/contracts/auth.ts';
import { DomainError } from '#shared/errors.ts';
import type { RequestContext } from '#server/http/context.ts';
import type { Account } from '#server/modules/users/account.entity.ts';
import { findAccountByEmail } from '#server/modules/users/find-account.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import { demoAccountsUsable } from './demo-gate.ts';
import { forgetOldSessions } from './end-sessions.ts';
import { addRenewal, createSession, setSessionCookies } from './issue-session.ts';
import { inTurn, passwordMatches } from './passwords.ts';
import { checkThrottle, forgiveFailures, recordFailure } from './throttle.ts';

type Credentials = z.output<typeof signInSchema>;

async function checkPassword(context: RequestContext, given: Credentials): Promise<Account> {
  const { em, now, config } = context;
  const attempt = { email: given.email, address: context.address };
  await checkThrottle(em, attempt, now);
  const account = await findAccountByEmail(em, given.email);
  const matches = await passwordMatches(given.password, account?.passwordHash, config.passwordCost);
  if (!account || !matches || !account.active) {
    await recordFailure(em, attempt, now);
    throw new DomainError('signInFailed', 'E-mail address or password is not right.');
  }
  if (account.demo && !demoAccountsUsable(config, context.headers)) {
    throw new DomainError(
      'signInFailed',
      'Demo accounts work only on the machine the application runs on, without a proxy, while the demo is on.',
    );
  }
  return account;
}

/** Signs a person in: a session in the database, two cookies in the browser. */
export async function signIn(context: RequestContext, given: Credentials): Promise<Account> {
  const { em, now } = context;
  const account = await inTurn(() => checkPassword(context, given));
  const { session, renewal } = await em.transactional((tx) => {
    const made = createSession(tx, account.id, now);
    const actor = { ...account, credential: { kind: 'session' as const } };
    recordTrail(tx, {
      actor,
      action: 'session.signIn',
      subject: { type: 'session', id: made.id },
      now,
    });
    return Promise.resolve({ session: made, renewal: addRenewal(tx, made, now) });
  });
  await forgiveFailures(em, { email: given.email, address: context.address }, now);
  await forgetOldSessions(em, now);
  setSessionCookies(context, session, renewal);
  return account;
}
