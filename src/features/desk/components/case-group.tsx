import { useId } from 'react';
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { CaseListItem } from '#shared/contracts/cases.ts';
import { ButtonLink } from '#src/components/button.tsx';
import { CaseLine } from '#src/components/case-line.tsx';
import { EmptyState } from '#src/components/empty-state.tsx';
import { Failure } from '#src/components/failure.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import type { caseListOptions } from '#src/lib/case-list.ts';

interface CaseGroupProps {
  title: string;
  options: ReturnType<typeof caseListOptions>;
  /** Which of the answer to show; all of it when left out. */
  wants?: (item: CaseListItem) => boolean;
  atMost: number;
  /** Where the whole list stands. */
  more: string;
  moreLabel: string;
  empty: { title: string; words: string; begins?: boolean };
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

export function CaseGroup({
  title,
  options,
  wants,
  atMost,
  more,
  moreLabel,
  empty,
}: CaseGroupProps) {
  const heading = useId();
  const { data, error, refetch } = useQuery(options);
  const wanted = data && wants ? data.items.filter(wants) : data?.items;
  const items = wanted?.slice(0, atMost);
  const goesOn =
    data && items && (data.total > data.items.length || (wanted?.length ?? 0) > items.length);
  return (
    <section aria-labelledby={heading} className="min-w-0">
      <div className="mb-1 flex items-baseline justify-between gap-3">
        <h2 id={heading} className="text-lg font-semibold">
          {title}
        </h2>
        {goesOn && (
          <Link to={more} className="rounded text-sm underline underline-offset-2">
            {moreLabel}
          </Link>
        )}
      </div>
      {items && items.length > 0 && (
        <ul className="divide-y divide-line rounded border border-line bg-sheet px-4">
          {items.map((item) => (
            <li key={item.id}>
              <CaseLine item={item} />
            </li>
          ))}
        </ul>
      )}
      {items?.length === 0 && (
        <EmptyState
          title={empty.title}
          actions={
            empty.begins && (
              <ButtonLink to="/cases/new" size="small">
                Begin a case
              </ButtonLink>
            )
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
