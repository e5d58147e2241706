import { useQuery } from '@tanstack/react-query';
import { Navigate, useLocation } from 'react-router-dom';
import { Failure } from '#src/components/failure.tsx';
import { Mark } from '#src/components/mark.tsx';
import { Waiting } from '#src/components/skeleton.tsx';
import { sessionQuery } from '#src/lib/session.ts';
import { Shell } from './shell.tsx';

/** Lets nobody in without a session, and brings who signs in back to the address they asked for. */
export function SignedIn() {
  const session = useQuery(sessionQuery);
  const { pathname, search, hash } = useLocation();
  if (session.data) return <Shell key={session.data.user.id} session={session.data} />;
  if (session.data === null) {
    const next = pathname + search + hash;
    return (
      <Navigate
        replace
        to={next === '/' ? '/sign-in' : `/sign-in?next=${encodeURIComponent(next)}`}
      />
    );
  }
  return (
    <main className="grid min-h-svh place-items-center p-6">
      {session.error ? (
        <Failure what="Your session" error={session.error} onRetry={() => void session.refetch()} />
      ) : (
        <Waiting what="Tallybarn">
          <Mark className="size-12 animate-pulse" />
        </Waiting>
      )}
    </main>
  );
}
