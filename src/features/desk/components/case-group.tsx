import { useId } from 'react';
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { ButtonLink } from '#src/components/button.tsx';
import { CaseLine } from '#src/components/case-line.tsx';
import { EmptyState } from '#src/components/empty-state.tsx';
import { Failure } from '#src/components/failure.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import type { caseListOptions } from '#src/lib/case-list.ts';

interface CaseGroupProps {
  title: string;
  options: ReturnType<typeof caseListOptions>;
  /** Where the whole list stands. */
  more: string;
  empty: { title: string; words: string };
}

function Placeholders() {
  return (
    <Waiting what="cases">
      {[0, 1, 2].map((row) => (
        <div key={row} className="flex flex-col gap-2 border-b border-line py-3 last:border-0">
          <Skeleton className="w-2/3" />
          <Skeleton className="w-5/6" />
        </div>
      ))}
    </Waiting>
  );
}

export function CaseGroup({ title, options, more, empty }: CaseGroupProps) {
  const heading = useId();
  const { data, error, refetch } = useQuery(options);
  const hidden = data ? data.total - data.items.length : 0;
  return (
    <section aria-labelledby={heading} className="min-w-0">
      <div className="mb-1 flex items-baseline justify-between gap-3">
        <h2 id={heading} className="text-lg font-semibold">
          {title}
        </h2>
        {hidden > 0 && (
          <Link to={more} className="rounded text-sm underline underline-offset-2">
            all {data?.total}
          </Link>
        )}
      </div>
      {data && data.items.length > 0 && (
        <ul className="divide-y divide-line rounded border border-line bg-sheet px-4">
          {data.items.map((item) => (
            <li key={item.id}>
              <CaseLine item={item} />
            </li>
          ))}
        </ul>
      )}
      {data?.items.length === 0 && (
        <EmptyState
          title={empty.title}
          actions={
            <ButtonLink to="/cases/new" size="small">
              Begin a case
            </ButtonLink>
          }
        >
          {empty.words}
        </EmptyState>
      )}
      {!data && !error && <Placeholders />}
      {error && !data && <Failure what={title} error={error} onRetry={() => void refetch()} />}
    </section>
  );
}
