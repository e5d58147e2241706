import type { User } from '#shared/contracts/users.ts';
import type { Actor } from '#server/http/actor.ts';
import type { Account } from './account.entity.ts';

/** The only way an account leaves the server. Who acts is active by that alone. */
export function presentUser(account: Account | Actor): User {
  const { id, name, email, role, demo, createdAt } = account;
  const active = 'active' in account ? account.active : true;
  return { id, name, email, role, active, demo, createdAt: createdAt.toISOString() };
}
