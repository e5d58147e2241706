import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { createTokenSchema } from '#shared/contracts/auth.ts';
import { DomainError } from '#shared/errors.ts';
import type { VerbContext } from '#server/http/context.ts';
import { hashSecret, newSecret } from '#server/modules/auth/session-token.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import { PersonalToken } from './personal-token.entity.ts';

const MAX_TOKENS = 50;
/** Lets a scanner of leaked secrets recognise it. */
const PREFIX = 'tbn_';

/** Makes a personal token; its secret is in the answer and nowhere else. */
export async function createToken(
  { em, actor, now }: VerbContext,
  input: z.output<typeof createTokenSchema>,
): Promise<{ token: PersonalToken; secret: string }> {
  const secret = newSecret(PREFIX);
  const token = await em.transactional(async (tx) => {
    const held = await tx.count(PersonalToken, { accountId: actor.id, revokedAt: null });
    if (held >= MAX_TOKENS) {
      throw new DomainError('conflict', `You have ${MAX_TOKENS} tokens; withdraw one first.`);
    }
    const made = tx.create(
      PersonalToken,
      {
        id: randomUUID(),
        accountId: actor.id,
        name: input.name,
        scope: input.scope,
        tokenHash: hashSecret(secret),
        createdAt: now,
        expiresAt: new Date(now.getTime() + input.expiresInDays * 24 * 3_600_000),
        lastUsedAt: null,
        revokedAt: null,
      },
      { persist: true },
    );
    recordTrail(tx, {
      actor,
      action: 'token.create',
      subject: { type: 'token', id: made.id },
      after: { name: made.name, scope: made.scope, expiresAt: made.expiresAt.toISOString() },
      now,
    });
    return made;
  });
  return { token, secret };
}
