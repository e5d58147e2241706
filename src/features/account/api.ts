import { queryOptions } from '@tanstack/react-query';
import { z } from 'zod';
import type { changePasswordSchema, createTokenSchema } from '#shared/contracts/auth.ts';
import { createdTokenSchema, tokenSchema } from '#shared/contracts/auth.ts';
import { request } from '#src/lib/api.ts';

const tokens = z.object({ items: z.array(tokenSchema) });

export const tokensQuery = queryOptions({
  queryKey: ['tokens'],
  queryFn: async ({ signal }) => (await request('/api/tokens', { answer: tokens, signal })).items,
});

export function createToken(body: z.infer<typeof createTokenSchema>) {
  return request('/api/tokens', { method: 'POST', body, answer: createdTokenSchema });
}

export function revokeToken(id: string) {
  return request(`/api/tokens/${encodeURIComponent(id)}`, {
    method: 'DELETE',
    answer: z.unknown(),
  });
}

export function changePassword(body: z.infer<typeof changePasswordSchema>) {
  return request('/api/auth/password', { method: 'POST', body, answer: z.unknown() });
}
