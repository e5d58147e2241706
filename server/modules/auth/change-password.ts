import type { z } from 'zod';
import type { changePasswordSchema } from '#shared/contracts/auth.ts';
import { DomainError } from '#shared/errors.ts';
import type { VerbContext } from '#server/http/context.ts';
import { checkPassword } from '#server/modules/users/check-password.ts';
import { findAccount } from '#server/modules/users/find-account.ts';
import { setPasswordHash } from '#server/modules/users/set-password-hash.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import { endSessionsOf } from './end-sessions.ts';
import { hashPassword, inTurn, passwordMatches } from './passwords.ts';
import { checkThrottle, recordFailure } from './throttle.ts';

interface Around {
  address: string;
  passwordCost: number;
}

/** Changes one's own password and ends every other session of the account. */
export async function changePassword(
  { em, actor, now }: VerbContext,
  given: z.output<typeof changePasswordSchema>,
  { address, passwordCost }: Around,
): Promise<void> {
  if (actor.demo) throw new DomainError('forbidden', 'The demo accounts keep their password.');
  checkPassword(given.newPassword, actor.email, '/newPassword');
  const attempt = { email: actor.email, address };
  const passwordHash = await inTurn(async () => {
    await checkThrottle(em, attempt, now);
    const account = await findAccount(em, actor.id);
    const { currentPassword, newPassword } = given;
    if (!(await passwordMatches(currentPassword, account?.passwordHash, passwordCost))) {
      await recordFailure(em, attempt, now);
      const message = 'This is not your current password.';
      throw new DomainError('invalidInput', message, {
        errors: [{ path: '/currentPassword', message }],
      });
    }
    return hashPassword(newPassword, passwordCost);
  });
  await em.transactional(async (tx) => {
    await setPasswordHash(tx, actor.id, passwordHash);
    const except = actor.credential.kind === 'session' ? actor.credential.sessionId : undefined;
    const ended = { reason: 'passwordChanged' as const, now, ...(except && { except }) };
    await endSessionsOf(tx, actor.id, ended);
    const subject = { type: 'account', id: actor.id };
    recordTrail(tx, { actor, action: 'account.changePassword', subject, now });
  });
}
