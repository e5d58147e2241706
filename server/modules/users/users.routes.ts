import { z } from 'zod';
import { listSchema, pageQuerySchema } from '#shared/contracts/list.ts';
import { createUserSchema, updateUserSchema, userSchema } from '#shared/contracts/users.ts';
import { defineRoute } from '#server/http/route.ts';
import { createUser } from './create-user.ts';
import { listUsers } from './list-users.ts';
import { presentUser } from './present-user.ts';
import { updateUser } from './update-user.ts';

export const userRoutes = [
  defineRoute({
    method: 'get',
    path: '/api/users',
    operationId: 'listUsers',
    summary: 'Accounts by name',
    tag: 'Accounts',
    access: 'user.list',
    query: pageQuerySchema.extend({ q: z.string().max(200).optional() }),
    response: listSchema(userSchema),
    async handler({ em, query }) {
      const { page, pageSize } = query;
      const [accounts, total] = await listUsers(em, query);
      return { items: accounts.map(presentUser), page, pageSize, total };
    },
  }),
  defineRoute({
    method: 'post',
    path: '/api/users',
    operationId: 'createUser',
    summary: 'Make an account',
    tag: 'Accounts',
    access: 'user.write',
    body: createUserSchema,
    response: userSchema,
    status: 201,
    refusals: ['conflict'],
    handler: async ({ body, config: { passwordCost }, ...context }) =>
      presentUser(await createUser({ ...context, passwordCost }, body)),
  }),
  defineRoute({
    method: 'patch',
    path: '/api/users/:id',
    operationId: 'updateUser',
    summary: 'Change name, role, activity or password of an account',
    tag: 'Accounts',
    access: 'user.write',
    params: z.object({ id: z.uuid() }),
    body: updateUserSchema,
    response: userSchema,
    refusals: ['conflict'],
    handler: async ({ body, params, config, ...context }) =>
      presentUser(await updateUser(context, params.id, body, config)),
  }),
];
