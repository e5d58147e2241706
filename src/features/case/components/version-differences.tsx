import { useState } from 'react';
import { useQueries } from '@tanstack/react-query';
import { Field } from '#src/components/field.tsx';
import { Select } from '#src/components/select.tsx';
import { Skeleton } from '#src/components/skeleton.tsx';
import { Failure } from '#src/components/failure.tsx';
import type { VersionDetail, VersionHead } from '#shared/contracts/cases.ts';
import { versionQuery } from '../api.ts';
import { useEditing } from '../editing/editor-context.ts';
import { differences } from '../model/fields.ts';
import type { Content } from '../model/fields.ts';
import { DifferenceTable } from '#src/components/difference-table.tsx';

const contentOf = ({ title, document }: VersionDetail): Content => ({ title, tags: [], document });

interface VersionDifferencesProps {
  caseId: string;
  heads: readonly VersionHead[];
}

/** What changed between any two versions. */
export function VersionDifferences({ caseId, heads }: VersionDifferencesProps) {
  const { forms } = useEditing();
  const newest = heads[0]?.n ?? 1;
  const [pair, setPair] = useState<{ before: number; after: number } | null>(null);
  const { before, after } = pair ?? { before: Math.max(1, newest - 1), after: newest };
  const [older, newer] = useQueries({
    queries: [versionQuery(caseId, before), versionQuery(caseId, after)],
  });
  const choices = heads.map(({ n }) => ({ value: String(n), label: `version ${n}` }));
  const failed = older.isError ? older : newer.isError ? newer : null;
  const found =
    older.data && newer.data
      ? differences(contentOf(older.data), contentOf(newer.data), forms)
      : null;

  return (
    <section aria-label="Differences" className="rounded border border-line bg-sheet px-4.5 py-4">
      <h2 className="font-bold">What changed</h2>
      <div className="my-3 grid max-w-md grid-cols-2 gap-3">
        <Field label="From">
          {(control) => (
            <Select
              {...control}
              value={String(before)}
              choices={choices}
              onChange={(n) => setPair({ before: Number(n), after })}
            />
          )}
        </Field>
        <Field label="To">
          {(control) => (
            <Select
              {...control}
              value={String(after)}
              choices={choices}
              onChange={(n) => setPair({ before, after: Number(n) })}
            />
          )}
        </Field>
      </div>
      {failed ? (
        <Failure what="A version" error={failed.error} onRetry={() => void failed.refetch()} />
      ) : found === null ? (
        <Skeleton className="h-6" />
      ) : found.length === 0 ? (
        <p className="text-muted">
          {before === after
            ? 'The same version twice.'
            : 'No field differs between these versions.'}
        </p>
      ) : (
        <DifferenceTable differences={found} />
      )}
    </section>
  );
}
