import type { EntityManager } from '@mikro-orm/postgresql';
import type { z } from 'zod';
import type { updateUserSchema } from '#shared/contracts/users.ts';
import { DomainError } from '#shared/errors.ts';
import type { AppConfig } from '#server/config.ts';
import type { VerbContext } from '#server/http/context.ts';
import { endSessionsOf } from '#server/modules/auth/end-sessions.ts';
import { hashPassword, inTurn } from '#server/modules/auth/passwords.ts';
import { forgiveFailures } from '#server/modules/auth/throttle.ts';
import { revokeTokensOf } from '#server/modules/tokens/revoke-tokens.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import { Account } from './account.entity.ts';
import { checkPassword } from './check-password.ts';

type Changes = z.output<typeof updateUserSchema>;
type Config = Pick<AppConfig, 'passwordCost' | 'demoAccountsOpen'>;

const SHOWN = ['name', 'role', 'active'] as const;

/** Administrators are locked in one order, so that two who demote each other cannot both succeed. */
async function requireAnotherAdministrator(
  em: EntityManager,
  account: Account,
  { demoAccountsOpen }: Config,
): Promise<void> {
  const others = await em.find(Account, {
    role: 'administrator',
    active: true,
    id: { $ne: account.id },
    ...(!demoAccountsOpen && { demo: false }),
  });
  if (others.length === 0) {
    throw new DomainError(
      'conflict',
      'This is the last active administrator; make another one first.',
    );
  }
}

async function lockAdministrators(em: EntityManager): Promise<void> {
  await em.execute(`select id from accounts where role = 'administrator' order by id for update`);
}

function passwordOf(account: Account, changes: Changes, cost: number): Promise<string> | undefined {
  if (changes.password === undefined) return undefined;
  if (account.demo) throw new DomainError('forbidden', 'The demo accounts keep their password.');
  const { password } = changes;
  checkPassword(password, account.email);
  return inTurn(() => hashPassword(password, cost));
}

/** Changes an account. Deactivating ends its sessions and tokens, a new password its sessions. */
export async function updateUser(
  { em, actor, now }: VerbContext,
  id: string,
  changes: Changes,
  config: Config,
): Promise<Account> {
  const known = await em.findOne(Account, { id });
  if (!known) throw new DomainError('notFound', 'There is no such account.');
  const passwordHash = await passwordOf(known, changes, config.passwordCost);
  return em.transactional(async (tx) => {
    await lockAdministrators(tx);
    const account = await tx.findOneOrFail(Account, { id }, { refresh: true });
    const before = Object.fromEntries(SHOWN.map((key) => [key, account[key]]));
    const wasAdministrator = account.role === 'administrator' && account.active;
    account.name = changes.name ?? account.name;
    account.role = changes.role ?? account.role;
    account.active = changes.active ?? account.active;
    if (wasAdministrator && !(account.role === 'administrator' && account.active)) {
      await requireAnotherAdministrator(tx, account, config);
    }
    if (!account.active) {
      await endSessionsOf(tx, id, { reason: 'deactivated', now });
      await revokeTokensOf(tx, id, now);
    }
    if (passwordHash !== undefined) {
      account.passwordHash = passwordHash;
      await endSessionsOf(tx, id, { reason: 'passwordChanged', now });
      await forgiveFailures(tx, { email: account.email }, now);
    }
    const after = Object.fromEntries(SHOWN.map((key) => [key, account[key]]));
    const note = passwordHash === undefined ? {} : { passwordChanged: true };
    recordTrail(tx, {
      actor,
      action: 'account.update',
      subject: { type: 'account', id },
      before,
      after: { ...after, ...note },
      now,
    });
    return account;
  });
}
