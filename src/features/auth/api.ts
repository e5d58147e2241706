import { queryOptions } from '@tanstack/react-query';
import { z } from 'zod';
import { signedInSchema } from '#shared/contracts/auth.ts';
import { request } from '#src/lib/api.ts';

export interface Credentials {
  email: string;
  password: string;
}

export function signIn(credentials: Credentials) {
  return request('/api/auth/sign-in', {
    method: 'POST',
    body: credentials,
    answer: signedInSchema,
    onSignedOut: 'refuse',
  });
}

export function signOut() {
  return request('/api/auth/sign-out', {
    method: 'POST',
    answer: z.unknown(),
    onSignedOut: 'refuse',
  });
}

const healthSchema = z.object({ demo: z.boolean().default(false) });

/** Whether the demo's accounts can be used here; open to all, since nobody is signed in yet. */
export const demoQuery = queryOptions({
  queryKey: ['health', 'demo'],
  queryFn: ({ signal }) => request('/api/health', { answer: healthSchema, signal }),
  staleTime: Infinity,
});
