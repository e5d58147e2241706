import type { EntityManager } from '@mikro-orm/postgresql';
import type { VerbContext } from '#server/http/context.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import { PersonalToken } from './personal-token.entity.ts';

/** Withdraws one token; done twice, it stays as it was. */
export async function revokeToken({ em, actor, now }: VerbContext, id: string): Promise<void> {
  await em.transactional(async (tx) => {
    const changed = await tx.nativeUpdate(
      PersonalToken,
      { id, revokedAt: null },
      { revokedAt: now },
    );
    if (changed === 0) return;
    recordTrail(tx, { actor, action: 'token.revoke', subject: { type: 'token', id }, now });
  });
}

/** Withdraws every token of an account, in the transaction of the caller, who writes the trail. */
export async function revokeTokensOf(
  em: EntityManager,
  accountId: string,
  now: Date,
): Promise<void> {
  await em.nativeUpdate(PersonalToken, { accountId, revokedAt: null }, { revokedAt: now });
}
