import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/postgresql';
import type { z } from 'zod';
import type { createUserSchema } from '#shared/contracts/users.ts';
import { DomainError } from '#shared/errors.ts';
import { hashPassword, inTurn } from '#server/modules/auth/passwords.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import type { TrailActor } from '#server/trail/record-trail.ts';
import { Account } from './account.entity.ts';
import { checkPassword } from './check-password.ts';
import { findAccountByEmail } from './find-account.ts';

export interface CreateUserContext {
  em: EntityManager;
  actor: TrailActor;
  now: Date;
  passwordCost: number;
}

/** Makes an account, by an administrator or by the command that makes the first one. */
export async function createUser(
  { em, actor, now, passwordCost }: CreateUserContext,
  input: z.output<typeof createUserSchema> & { demo?: boolean },
): Promise<Account> {
  if (input.demo !== true) checkPassword(input.password, input.email);
  const passwordHash = await inTurn(() => hashPassword(input.password, passwordCost));
  return em.transactional(async (tx) => {
    if (await findAccountByEmail(tx, input.email)) {
      const message = `There is an account with the address ${input.email} already.`;
      throw new DomainError('conflict', message, { errors: [{ path: '/email', message }] });
    }
    const { name, email, role, demo = false } = input;
    const account = tx.create(
      Account,
      { id: randomUUID(), email, name, role, passwordHash, active: true, demo, createdAt: now },
      { persist: true },
    );
    const subject = { type: 'account', id: account.id };
    recordTrail(tx, {
      actor,
      action: 'account.create',
      subject,
      after: { name, email, role, demo },
      now,
    });
    return account;
  });
}
