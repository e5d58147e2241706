import { useQuery } from '@tanstack/react-query';
import { Plus } from 'lucide-react';
import { ButtonLink } from '#src/components/button.tsx';
import { EmptyState } from '#src/components/empty-state.tsx';
import { Failure } from '#src/components/failure.tsx';
import { Notice } from '#src/components/notice.tsx';
import { PageHead } from '#src/components/page-head.tsx';
import { Pagination } from '#src/components/pagination.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { caseListOptions } from '#src/lib/case-list.ts';
import { mayEver, useSession } from '#src/lib/session.ts';
import { useCaseAddress, type CaseAddress } from '../address.ts';
import { CaseTable } from '../components/case-table.tsx';
import { Filters } from '../components/filters.tsx';

function Placeholders() {
  return (
    <Waiting what="the cases">
      <div className="divide-y divide-line rounded border border-line bg-sheet">
        {[0, 1, 2, 3, 4].map((row) => (
          <div key={row} className="flex flex-col gap-2 px-3 py-3.5">
            <Skeleton className="w-1/2" />
            <Skeleton className="w-2/3" />
          </div>
        ))}
      </div>
    </Waiting>
  );
}

function NothingFound({ address }: { address: CaseAddress }) {
  const { q, status, tag, campaign, owner, page } = address.query;
  if (page && page > 1) {
    return (
      <EmptyState
        title="This page of the list is empty."
        actions={
          <ButtonLink to={address.hrefWith({ page: undefined })} size="small">
            To the first page
          </ButtonLink>
        }
      />
    );
  }
  if (q || status || tag || campaign || owner === 'me') {
    return (
      <EmptyState
        title={q ? `No case fits “${q}” and the filters.` : 'No case fits the filters.'}
        actions={
          <ButtonLink to="/cases" size="small">
            Show every case
          </ButtonLink>
        }
      >
        The search looks at numbers, titles, tags and the stations of the beam line.
      </EmptyState>
    );
  }
  return (
    <EmptyState
      title="No case yet."
      actions={
        <ButtonLink to="/cases/new" look="primary">
          Begin the first case
        </ButtonLink>
      }
    >
      A case holds a beam, a target and the interaction between them, with everything computed from
      it. Yours and those of your campaigns are listed here.
    </EmptyState>
  );
}

function Listed() {
  const address = useCaseAddress();
  const { data, error, isPlaceholderData, refetch } = useQuery(caseListOptions(address.query));
  return (
    <>
      <Filters address={address} />
      {error && <Failure what="The cases" error={error} onRetry={() => void refetch()} />}
      {!data && !error && <Placeholders />}
      {data && !error && (
        <>
          <p role="status" className="sr-only">
            {isPlaceholderData ? 'Searching …' : `${data.total} cases found`}
          </p>
          {data.items.length === 0 && !isPlaceholderData ? (
            <NothingFound address={address} />
          ) : (
            <CaseTable items={data.items} address={address} dimmed={isPlaceholderData} />
          )}
          <Pagination
            page={data.page}
            pageSize={data.pageSize}
            total={data.total}
            noun="cases"
            hrefOf={(page) => address.hrefWith({ page: page === 1 ? undefined : String(page) })}
          />
        </>
      )}
    </>
  );
}

export default function CasesPage() {
  const session = useSession();
  const mayList = mayEver(session, 'case.list');
  return (
    <div className="flex flex-col gap-4">
      <PageHead title="Cases">
        {mayList && (
          <ButtonLink to="/cases/new" look="primary">
            <Plus aria-hidden="true" className="size-4" /> New case
          </ButtonLink>
        )}
      </PageHead>
      {mayList ? (
        <Listed />
      ) : (
        <Notice tone="info" title="An administrator reads no case.">
          Cases belong to the people who work on them; this account keeps accounts and settings.
        </Notice>
      )}
    </div>
  );
}
