import { z } from 'zod';
import { createTokenSchema, createdTokenSchema, tokenSchema } from '#shared/contracts/auth.ts';
import { listSchema, pageQuerySchema } from '#shared/contracts/list.ts';
import { defineRoute, ownAccount } from '#server/http/route.ts';
import { createToken } from './create-token.ts';
import { PersonalToken } from './personal-token.entity.ts';
import { presentToken } from './present-token.ts';
import { revokeToken } from './revoke-tokens.ts';

export const tokenRoutes = [
  defineRoute({
    method: 'get',
    path: '/api/tokens',
    operationId: 'listTokens',
    summary: 'Your personal tokens, newest first',
    tag: 'Tokens',
    access: 'token.own',
    resource: ownAccount,
    sessionOnly: true,
    query: pageQuerySchema,
    response: listSchema(tokenSchema),
    async handler({ em, actor, query: { page, pageSize } }) {
      const [tokens, total] = await em.findAndCount(
        PersonalToken,
        { accountId: actor.id, revokedAt: null },
        {
          orderBy: { createdAt: 'desc', id: 'asc' },
          limit: pageSize,
          offset: (page - 1) * pageSize,
        },
      );
      return { items: tokens.map(presentToken), page, pageSize, total };
    },
  }),
  defineRoute({
    method: 'post',
    path: '/api/tokens',
    operationId: 'createToken',
    summary: 'Make a personal token; the secret is shown once',
    tag: 'Tokens',
    access: 'token.own',
    resource: ownAccount,
    sessionOnly: true,
    body: createTokenSchema,
    response: createdTokenSchema,
    status: 201,
    refusals: ['conflict'],
    async handler({ body, ...context }) {
      const { token, secret } = await createToken(context, body);
      return { ...presentToken(token), secret };
    },
  }),
  defineRoute({
    method: 'delete',
    path: '/api/tokens/:id',
    operationId: 'revokeToken',
    summary: 'Withdraw a personal token',
    tag: 'Tokens',
    access: 'token.own',
    visibleBy: 'token.own',
    sessionOnly: true,
    params: z.object({ id: z.uuid() }),
    async resource({ em, params }) {
      const token = await em.findOne(PersonalToken, { id: params.id });
      return token ? { ownerId: token.accountId } : undefined;
    },
    handler: ({ params, ...context }) => revokeToken(context, params.id),
  }),
];
