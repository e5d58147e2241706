import { useQuery } from '@tanstack/react-query';
import { Failure } from '#src/components/failure.tsx';
import { Notice } from '#src/components/notice.tsx';
import { PageHead } from '#src/components/page-head.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { mayEver, useSession } from '#src/lib/session.ts';
import { settingsQuery } from '../api.ts';
import { SettingsHistory } from '../components/settings-history.tsx';
import { ThresholdForm } from '../components/threshold-form.tsx';
import { ThresholdTable } from '../components/threshold-table.tsx';

function Thresholds() {
  const may = mayEver(useSession(), 'settings.write');
  const { data, error, refetch } = useQuery(settingsQuery);
  if (error) return <Failure what="The settings" error={error} onRetry={() => void refetch()} />;
  if (!data) {
    return (
      <Waiting what="the settings">
        <Skeleton className="mb-4 h-32" />
        <Skeleton className="h-32" />
      </Waiting>
    );
  }
  if (may) {
    return <ThresholdForm settings={data.data} etag={data.etag ?? ''} />;
  }
  return (
    <>
      <Notice tone="info" title="Settings are changed by administrators.">
        These are the ones in force; ask an administrator to change them.
      </Notice>
      <ThresholdTable settings={data.data} />
    </>
  );
}

/** What the lab has decided for everybody. */
export default function SettingsPage() {
  return (
    <div className="flex max-w-3xl flex-col gap-6">
      <div className="flex flex-col gap-1.5">
        <PageHead title="Settings" />
        <p className="max-w-[75ch] text-muted">
          Up to where the verdict calls first order sound or usable; beyond, it is not valid. A
          change counts from the next computation on: saved versions keep their verdict.
        </p>
      </div>
      <Thresholds />
      <SettingsHistory />
    </div>
  );
}
