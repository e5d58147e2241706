import { useState } from 'react';
import { useQueries, useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { InteractionDetail, InteractionHead } from '#shared/contracts/library.ts';
import { DifferenceTable } from '#src/components/difference-table.tsx';
import { Failure } from '#src/components/failure.tsx';
import { Field } from '#src/components/field.tsx';
import { Select } from '#src/components/select.tsx';
import { Skeleton } from '#src/components/skeleton.tsx';
import { When } from '#src/components/when.tsx';
import { formsQuery } from '#src/lib/forms.ts';
import { interactionDifferences } from '#src/lib/interaction-words.ts';
import { interactionHref, interactionVersionQuery } from '#src/lib/library.ts';
import { Section } from './what-it-is.tsx';

function Head({ id, head, shown }: { id: string; head: InteractionHead; shown: boolean }) {
  return (
    <li className="px-4 py-2.5">
      <div className="flex flex-wrap items-baseline gap-x-3 gap-y-0.5">
        <Link
          to={interactionHref(id, head.n)}
          {...(shown && { 'aria-current': 'page' as const })}
          className="font-semibold underline decoration-line underline-offset-4 hover:decoration-barn"
        >
          Version {head.n}
        </Link>
        <span className="text-sm text-muted">
          <When iso={head.createdAt} /> · {head.author.name} ·{' '}
          <span className="font-mono" title={head.hash}>
            {head.hash.slice(0, 12)}
          </span>
          {shown && ' · shown here'}
        </span>
      </div>
      {head.note && <p className="mt-0.5 max-w-prose whitespace-pre-line">{head.note}</p>}
    </li>
  );
}

function Differences({ id, newest }: { id: string; newest: number }) {
  const [pair, setPair] = useState({ before: newest - 1, after: newest });
  const forms = useQuery(formsQuery).data ?? [];
  const [older, newer] = useQueries({
    queries: [interactionVersionQuery(id, pair.before), interactionVersionQuery(id, pair.after)],
  });
  const choices = Array.from({ length: newest }, (_, i) => newest - i).map((n) => ({
    value: String(n),
    label: `version ${n}`,
  }));
  const failed = older.isError ? older : newer.isError ? newer : null;
  const found =
    older.data && newer.data ? interactionDifferences(older.data, newer.data, forms) : null;
  return (
    <div className="rounded border border-line bg-sheet px-4 py-3">
      <h3 className="font-bold">What changed</h3>
      <div className="my-3 grid max-w-md grid-cols-2 gap-3">
        {(['before', 'after'] as const).map((side) => (
          <Field key={side} label={side === 'before' ? 'From' : 'To'}>
            {(control) => (
              <Select
                {...control}
                value={String(pair[side])}
                choices={choices}
                onChange={(n) => setPair({ ...pair, [side]: Number(n) })}
              />
            )}
          </Field>
        ))}
      </div>
      {failed ? (
        <Failure what="A version" error={failed.error} onRetry={() => void failed.refetch()} />
      ) : found === null ? (
        <Skeleton className="h-6" />
      ) : found.length === 0 ? (
        <p className="text-muted">Nothing differs.</p>
      ) : (
        <DifferenceTable differences={found} />
      )}
    </div>
  );
}

/** Every version there was, and what changed between any two. */
export function Versions({
  interaction,
  shown,
}: {
  interaction: InteractionDetail;
  shown: number;
}) {
  const { id, versions, newestVersion } = interaction;
  return (
    <Section title="Versions">
      <ol className="divide-y divide-line rounded border border-line bg-sheet">
        {versions.map((head) => (
          <Head key={head.n} id={id} head={head} shown={head.n === shown} />
        ))}
      </ol>
      {newestVersion > 1 && <Differences key={newestVersion} id={id} newest={newestVersion} />}
    </Section>
  );
}
