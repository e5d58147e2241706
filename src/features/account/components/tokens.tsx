import { useState } from 'react';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { Plus } from 'lucide-react';
import type { Token } from '#shared/contracts/auth.ts';
import { Button } from '#src/components/button.tsx';
import { Chip } from '#src/components/chip.tsx';
import { ConfirmDialog } from '#src/components/confirm-dialog.tsx';
import { EmptyState } from '#src/components/empty-state.tsx';
import { Failure } from '#src/components/failure.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { When } from '#src/components/when.tsx';
import { inWords } from '#src/lib/api.ts';
import { dayOf } from '#src/lib/dates.ts';
import { say } from '#src/lib/toasts.ts';
import { revokeToken, tokensQuery } from '../api.ts';
import { NewToken } from './new-token.tsx';

const SCOPE_LABELS: Record<Token['scope'], string> = {
  read: 'reads only',
  write: 'reads and writes',
};

function TokenLine({
  token,
  expired,
  onRevoke,
}: {
  token: Token;
  expired: boolean;
  onRevoke: () => void;
}) {
  return (
    <li className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 py-2.5">
      <div className="min-w-0">
        <span className="font-semibold">{token.name}</span>
        <span className="ml-2 text-sm text-muted">{SCOPE_LABELS[token.scope]}</span>
        <div className="flex flex-wrap items-center gap-x-2 text-sm text-muted">
          {expired ? (
            <Chip tone="plain">Expired {dayOf(token.expiresAt)}</Chip>
          ) : (
            <span>until {dayOf(token.expiresAt)}</span>
          )}
          <span>
            ·{' '}
            {token.lastUsedAt ? (
              <>
                last used <When iso={token.lastUsedAt} />
              </>
            ) : (
              'never used'
            )}
          </span>
        </div>
      </div>
      <Button size="small" onClick={onRevoke} aria-label={`Revoke ${token.name}`}>
        Revoke
      </Button>
    </li>
  );
}

export function Tokens() {
  const client = useQueryClient();
  const { data, dataUpdatedAt, error, refetch } = useQuery(tokensQuery);
  const [making, setMaking] = useState(false);
  const [doomed, setDoomed] = useState<Token | null>(null);
  const revoke = useMutation({
    mutationFn: revokeToken,
    onSuccess: () => {
      say(`The token “${doomed?.name ?? ''}” is revoked.`, { tone: 'sound' });
      setDoomed(null);
      return client.invalidateQueries({ queryKey: tokensQuery.queryKey });
    },
    onError: (refusal) => say(inWords(refusal), { tone: 'fault' }),
  });
  const make = (
    <Button onClick={() => setMaking(true)} className="self-start">
      <Plus aria-hidden="true" className="size-4" /> New token
    </Button>
  );

  return (
    <div className="flex flex-col gap-3">
      {error && !data && (
        <Failure what="Your tokens" error={error} onRetry={() => void refetch()} />
      )}
      {!data && !error && (
        <Waiting what="your tokens">
          <Skeleton className="h-10" />
        </Waiting>
      )}
      {data?.length === 0 && (
        <EmptyState title="No tokens." actions={make}>
          A script that computes or reads cases on your behalf signs in with a token, never with
          your password.
        </EmptyState>
      )}
      {data && data.length > 0 && (
        <>
          <ul className="divide-y divide-line rounded border border-line bg-sheet px-4">
            {data.map((token) => (
              <TokenLine
                key={token.id}
                token={token}
                expired={new Date(token.expiresAt).getTime() <= dataUpdatedAt}
                onRevoke={() => setDoomed(token)}
              />
            ))}
          </ul>
          {make}
        </>
      )}
      <NewToken open={making} onOpenChange={setMaking} />
      <ConfirmDialog
        open={doomed !== null}
        onOpenChange={(open) => !open && setDoomed(null)}
        title="Revoke this token?"
        description={`Scripts that use “${doomed?.name ?? ''}” are refused from now on. This cannot be undone.`}
        confirm="Revoke"
        busy={revoke.isPending}
        onConfirm={() => doomed && revoke.mutate(doomed.id)}
      />
    </div>
  );
}
