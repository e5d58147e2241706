import { useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { StatusChip } from '#src/components/chip.tsx';
import { Failure } from '#src/components/failure.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import type { CaseDetail, VersionHead } from '#shared/contracts/cases.ts';
import { versionsQuery } from '../api.ts';
import { momentText } from '../model/moments.ts';
import { ReportLinks } from './report-links.tsx';
import { VersionDifferences } from './version-differences.tsx';
import { VersionResult } from './version-result.tsx';
import { Withdraw } from './withdraw.tsx';

function VersionRow({ caseId, head }: { caseId: string; head: VersionHead }) {
  const [open, setOpen] = useState(false);
  return (
    <li className="border-t border-line px-4.5 py-3 first:border-t-0">
      <div className="flex flex-wrap items-center gap-x-3 gap-y-1">
        <Link
          to={`/cases/${caseId}/versions/${head.n}`}
          className="font-semibold underline decoration-line underline-offset-4 hover:decoration-barn"
        >
          Version {head.n}
        </Link>
        {head.status && <StatusChip status={head.status} />}
        <span className="text-sm text-muted">
          <time dateTime={head.createdAt}>{momentText(head.createdAt)}</time> · {head.author.name} ·{' '}
          <span className="font-mono" title={head.hash}>
            {head.hash.slice(0, 12)}
          </span>
        </span>
      </div>
      {head.note && <p className="mt-1 whitespace-pre-line">{head.note}</p>}
      <ReportLinks caseId={caseId} n={head.n} />
      <details className="mt-1" onToggle={(event) => setOpen(event.currentTarget.open)}>
        <summary className="w-fit rounded text-sm text-muted hover:text-ink">
          Result as stored
        </summary>
        <div className="mt-2">{open && <VersionResult caseId={caseId} n={head.n} />}</div>
      </details>
    </li>
  );
}

const WITHDRAWABLE = ['draft', 'inReview'];

/** Who saved what and when, what changed, and the results as they stood. */
export function Record({ detail, etag }: { detail: CaseDetail; etag: string }) {
  const query = useQuery(versionsQuery(detail.id));
  if (query.isError) {
    return <Failure what="The record" error={query.error} onRetry={() => void query.refetch()} />;
  }
  if (!query.data) {
    return (
      <Waiting what="the record">
        <Skeleton className="h-24" />
      </Waiting>
    );
  }
  const heads = query.data;
  return (
    <div className="flex flex-col gap-4">
      <section aria-label="Versions" className="rounded border border-line bg-sheet">
        <ol>
          {heads.map((head) => (
            <VersionRow key={head.n} caseId={detail.id} head={head} />
          ))}
        </ol>
      </section>
      {heads.length > 1 && <VersionDifferences caseId={detail.id} heads={heads} />}
      {detail.mayEdit && WITHDRAWABLE.includes(detail.status) && (
        <div data-screen-only>
          <Withdraw caseId={detail.id} n={detail.version.n} etag={etag} />
        </div>
      )}
    </div>
  );
}
