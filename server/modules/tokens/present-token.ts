import type { Token } from '#shared/contracts/auth.ts';
import type { PersonalToken } from './personal-token.entity.ts';

export function presentToken(token: PersonalToken): Token {
  return {
    id: token.id,
    name: token.name,
    scope: token.scope,
    createdAt: token.createdAt.toISOString(),
    expiresAt: token.expiresAt.toISOString(),
    lastUsedAt: token.lastUsedAt?.toISOString() ?? null,
  };
}
