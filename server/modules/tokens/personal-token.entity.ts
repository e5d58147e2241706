import { defineEntity } from '@mikro-orm/core';
import type { InferEntity } from '@mikro-orm/core';
import type { TOKEN_SCOPES } from '#shared/contracts/auth.ts';

/** A personal token for scripts; the secret itself is shown once and kept as a hash. */
export const PersonalToken = defineEntity({
  name: 'PersonalToken',
  tableName: 'personal_tokens',
  properties: (p) => ({
    id: p.uuid().primary(),
    accountId: p.uuid(),
    name: p.text(),
    scope: p.text().$type<(typeof TOKEN_SCOPES)[number]>(),
    tokenHash: p.text().unique().hidden(),
    createdAt: p.datetime(),
    expiresAt: p.datetime(),
    lastUsedAt: p.datetime().nullable(),
    revokedAt: p.datetime().nullable(),
  }),
});
export type PersonalToken = InferEntity<typeof PersonalToken>;
