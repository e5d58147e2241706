import type { EntityManager } from '@mikro-orm/postgresql';
import { Account } from './account.entity.ts';

export async function setPasswordHash(
  em: EntityManager,
  accountId: string,
  passwordHash: string,
): Promise<void> {
  const account = await em.findOneOrFail(Account, { id: accountId });
  account.passwordHash = passwordHash;
}
