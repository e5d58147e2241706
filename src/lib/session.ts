import { queryOptions, useQuery } from '@tanstack/react-query';
import { sessionSchema, type Session } from '#shared/contracts/auth.ts';
import { PERMISSIONS, type Action } from '#shared/roles.ts';
import { ApiError, request } from './api.ts';
import { askForSession } from './session-loss.ts';

/** Who is signed in; null when nobody is. */
export const sessionQuery = queryOptions({
  queryKey: ['session'],
  queryFn: async ({ signal, client }): Promise<Session | null> => {
    try {
      return await request('/api/auth/session', {
        answer: sessionSchema,
        signal,
        onSignedOut: 'refuse',
      });
    } catch (error) {
      if (!(error instanceof ApiError) || error.code !== 'unauthenticated') throw error;
      // A page that is open stays open, with all that stands on it, while its person signs in again.
      if (!client.getQueryData<Session | null>(['session'])) return null;
      askForSession();
      throw error;
    }
  },
  staleTime: 60_000,
});

/** The session inside the shell, where there is one. */
export function useSession(): Session {
  const { data } = useQuery(sessionQuery);
  if (!data)
    throw new Error('This part of the page stands inside the shell, where someone is signed in.');
  return data;
}

/** Whether the role has the action at all; whose case it is, only the server decides. */
export function mayEver(session: Session, action: Action): boolean {
  return PERMISSIONS[session.user.role][action] !== 'none';
}
