import type { EntityManager } from '@mikro-orm/postgresql';
import type { Actor } from '#server/http/actor.ts';
import { Account } from './account.entity.ts';

export function findAccount(em: EntityManager, id: string): Promise<Account | null> {
  return em.findOne(Account, { id });
}

export function findAccountByEmail(em: EntityManager, email: string): Promise<Account | null> {
  return em.findOne(Account, { email: email.trim().toLowerCase() });
}

export function actorOf(account: Account, credential: Actor['credential']): Actor {
  const { id, name, email, role, demo, createdAt } = account;
  return { id, name, email, role, demo, createdAt, credential };
}
