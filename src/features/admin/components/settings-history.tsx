import { useQuery } from '@tanstack/react-query';
import { DifferenceTable } from '#src/components/difference-table.tsx';
import { Failure } from '#src/components/failure.tsx';
import { Skeleton } from '#src/components/skeleton.tsx';
import { When } from '#src/components/when.tsx';
import { settingsHistoryQuery } from '../api.ts';
import { settingsDifferences } from '../model/thresholds.ts';

/** Who changed what when. */
export function SettingsHistory() {
  const { data, error, refetch } = useQuery(settingsHistoryQuery);
  return (
    <section className="flex flex-col gap-2">
      <h2 className="text-lg font-semibold">Changes</h2>
      {error && <Failure what="The history" error={error} onRetry={() => void refetch()} />}
      {!data && !error && <Skeleton className="h-12" />}
      {data?.total === 0 && (
        <p className="text-muted">Nobody has changed the settings; the defaults are in force.</p>
      )}
      {data && data.total > 0 && (
        <ol className="divide-y divide-line rounded border border-line bg-sheet">
          {data.items.map(({ version, before, after, note, at, by }) => (
            <li key={version} className="px-4 py-3">
              <p className="text-sm text-muted">
                <span className="font-semibold text-ink">Version {version}</span> · {by.name} ·{' '}
                <When iso={at} />
              </p>
              <DifferenceTable differences={settingsDifferences(before, after)} />
              {note && <p className="mt-1 max-w-prose whitespace-pre-line">{note}</p>}
            </li>
          ))}
        </ol>
      )}
      {data && data.total > data.items.length && (
        <p className="text-muted">
          and {data.total - data.items.length} older ones, which the trail keeps too.
        </p>
      )}
    </section>
  );
}
