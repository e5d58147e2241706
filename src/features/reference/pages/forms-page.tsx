import { useCallback } from 'react';
import { useQuery } from '@tanstack/react-query';
import { ButtonLink } from '#src/components/button.tsx';
import { EmptyState } from '#src/components/empty-state.tsx';
import { Failure } from '#src/components/failure.tsx';
import { PageHead } from '#src/components/page-head.tsx';
import { SearchBox } from '#src/components/search-box.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { useTableAddress } from '../address.ts';
import { formsTable } from '../api.ts';
import { FormCards } from '../components/form-cards.tsx';
import { Provenance } from '../components/provenance.tsx';

const NONE = {};
const NO_SORT: readonly string[] = [];
/** The register is short: it stands on one page. */
const ALL = 200;

function Loading() {
  return (
    <Waiting what="the forms">
      <div className="grid gap-3 md:grid-cols-2 xl:grid-cols-3">
        {[0, 1, 2, 3, 4, 5].map((card) => (
          <Skeleton key={card} className="h-36" />
        ))}
      </div>
    </Waiting>
  );
}

/** Every interaction form the engine knows. */
export default function FormsPage() {
  const { query, change } = useTableAddress(NO_SORT, NONE);
  const search = useCallback((q: string) => change({ q }, true), [change]);
  const { data, error, refetch } = useQuery(formsTable.page({ q: query['q'], pageSize: ALL }));
  const q = typeof query['q'] === 'string' ? query['q'] : '';
  return (
    <div className="flex flex-col gap-4">
      <div className="flex flex-col gap-1.5">
        <PageHead title="Interaction forms" />
        <p className="max-w-[75ch] text-muted">
          The shapes a potential may have, as the engine computes them. The curves are drawn for the
          defaults of each form.
        </p>
      </div>
      {data && <Provenance table={data.table} />}
      <div data-screen-only className="flex">
        <SearchBox
          id="table-search"
          label="Search the forms"
          placeholder="Name or author: Yukawa, optical model, Rutherford"
          value={q}
          onSearch={search}
        />
      </div>
      {error && <Failure what="The forms" error={error} onRetry={() => void refetch()} />}
      {!data && !error && <Loading />}
      {data && !error && (
        <>
          <p role="status" className="sr-only">
            {data.total} forms found
          </p>
          {data.items.length === 0 ? (
            <EmptyState
              title={`No form fits “${q}”.`}
              actions={
                <ButtonLink to="/reference/forms" size="small">
                  Show every form
                </ButtonLink>
              }
            >
              A potential that is none of these can be written as a formula or given as a table of
              points.
            </EmptyState>
          ) : (
            <FormCards items={data.items} />
          )}
        </>
      )}
    </div>
  );
}
