import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/postgresql';
import { hash } from 'bcryptjs';
import { hashSecret, newSecret } from '#server/modules/auth/session-token.ts';
import { PersonalToken } from '#server/modules/tokens/personal-token.entity.ts';
import { Account } from '#server/modules/users/account.entity.ts';

export const TEST_PASSWORD = 'a password for tests';
const passwordHash = hash(TEST_PASSWORD, 4);
let counter = 0;

/** An account; what is not said is invented. Its password is TEST_PASSWORD. */
export async function makeAccount(
  em: EntityManager,
  changes: Partial<Account> = {},
): Promise<Account> {
  counter += 1;
  const account = em.create(Account, {
    id: randomUUID(),
    email: `person-${counter}-${randomUUID().slice(0, 8)}@example.org`,
    name: `Person ${counter}`,
    role: 'experimentalist',
    passwordHash: await passwordHash,
    active: true,
    demo: false,
    createdAt: new Date(),
    ...changes,
  });
  await em.persistAndFlush(account);
  return account;
}

/** A personal token and its secret; its owner is invented where none is given. */
export async function makeToken(
  em: EntityManager,
  { account, ...changes }: Partial<PersonalToken> & { account?: Account } = {},
): Promise<{ token: PersonalToken; secret: string; account: Account }> {
  const owner = account ?? (await makeAccount(em));
  const secret = newSecret('tbn_');
  const createdAt = changes.createdAt ?? new Date();
  const token = em.create(PersonalToken, {
    id: randomUUID(),
    accountId: owner.id,
    name: 'A script',
    scope: 'write',
    tokenHash: hashSecret(secret),
    createdAt,
    expiresAt: new Date(createdAt.getTime() + 24 * 3_600_000),
    lastUsedAt: null,
    revokedAt: null,
    ...changes,
  });
  await em.persistAndFlush(token);
  return { token, secret, account: owner };
}
