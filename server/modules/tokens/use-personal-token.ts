import type { EntityManager } from '@mikro-orm/postgresql';
import { hashSecret } from '#server/modules/auth/session-token.ts';
import { PersonalToken } from './personal-token.entity.ts';

const USED_EVERY_MILLISECONDS = 60_000;

/** The token this secret belongs to, if it is valid now; the time of use is kept to the minute. */
export async function usePersonalToken(
  { em, now }: { em: EntityManager; now: Date },
  secret: string,
): Promise<PersonalToken | undefined> {
  const token = await em.findOne(PersonalToken, { tokenHash: hashSecret(secret) });
  if (!token || token.revokedAt || token.expiresAt <= now) return undefined;
  const recently = new Date(now.getTime() - USED_EVERY_MILLISECONDS);
  if (!token.lastUsedAt || token.lastUsedAt < recently) {
    await em.nativeUpdate(PersonalToken, { id: token.id }, { lastUsedAt: now });
  }
  return token;
}
