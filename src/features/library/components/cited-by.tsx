import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { StatusChip } from '#src/components/chip.tsx';
import { Failure } from '#src/components/failure.tsx';
import { Skeleton } from '#src/components/skeleton.tsx';
import { citingCasesQuery } from '#src/lib/library.ts';
import { Section } from './what-it-is.tsx';

/** The cases one may read that have this interaction in them now. */
export function CitedBy({ id, newest }: { id: string; newest: number }) {
  const { data, error, refetch } = useQuery(citingCasesQuery(id));
  return (
    <Section title="Cases that cite it">
      {error && <Failure what="The cases" error={error} onRetry={() => void refetch()} />}
      {!data && !error && <Skeleton className="h-10" />}
      {data?.total === 0 && (
        <p className="text-muted">None of the cases you may read has it in its newest version.</p>
      )}
      {data && data.total > 0 && (
        <ul className="divide-y divide-line rounded border border-line bg-sheet">
          {data.items.map((item) => (
            <li
              key={item.id}
              className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1 px-4 py-2.5"
            >
              <Link
                to={`/cases/${item.id}`}
                className="min-w-0 rounded font-semibold hover:underline"
              >
                <span className="mr-2 font-mono text-sm font-normal text-muted">{item.number}</span>
                {item.title}
              </Link>
              <span className="flex flex-wrap items-center gap-x-3 text-sm text-muted">
                <StatusChip status={item.status} />
                <span className={item.citedVersion < newest ? 'text-straw' : undefined}>
                  cites version {item.citedVersion}
                </span>
                <span>{item.owner.name}</span>
              </span>
            </li>
          ))}
        </ul>
      )}
      {data && data.total > data.items.length && (
        <p className="text-muted">
          and {data.total - data.items.length} more; these are the ones changed last.
        </p>
      )}
    </Section>
  );
}
