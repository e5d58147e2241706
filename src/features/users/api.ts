import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import type { z } from 'zod';
import { listSchema } from '#shared/contracts/list.ts';
import {
  userSchema,
  type createUserSchema,
  type updateUserSchema,
} from '#shared/contracts/users.ts';
import { request } from '#src/lib/api.ts';

const answer = listSchema(userSchema);

export function usersOptions(query: { q?: string; page?: number }) {
  return queryOptions({
    queryKey: ['users', query],
    queryFn: ({ signal }) => request('/api/users', { query, answer, signal }),
    placeholderData: keepPreviousData,
  });
}

export function createUser(body: z.infer<typeof createUserSchema>) {
  return request('/api/users', { method: 'POST', body, answer: userSchema });
}

export function updateUser({ id, ...body }: z.infer<typeof updateUserSchema> & { id: string }) {
  return request(`/api/users/${encodeURIComponent(id)}`, {
    method: 'PATCH',
    body,
    answer: userSchema,
  });
}
