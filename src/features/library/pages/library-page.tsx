import { useQuery } from '@tanstack/react-query';
import { ButtonLink } from '#src/components/button.tsx';
import { EmptyState } from '#src/components/empty-state.tsx';
import { Failure } from '#src/components/failure.tsx';
import { PageHead } from '#src/components/page-head.tsx';
import { Pagination } from '#src/components/pagination.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { interactionListOptions } from '#src/lib/library.ts';
import { mayEver, useSession } from '#src/lib/session.ts';
import { useLibraryAddress, type LibraryAddress } from '../address.ts';
import { Filters } from '../components/filters.tsx';
import { NewInteraction } from '../components/how-to-publish.tsx';
import { InteractionList } from '../components/interaction-list.tsx';

function Placeholders() {
  return (
    <Waiting what="the library">
      <div className="divide-y divide-line rounded border border-line bg-sheet">
        {[0, 1, 2, 3].map((row) => (
          <div key={row} className="flex flex-col gap-2 px-4 py-3.5">
            <Skeleton className="w-1/3" />
            <Skeleton className="w-2/3" />
          </div>
        ))}
      </div>
    </Waiting>
  );
}

function NothingFound({ address, publishes }: { address: LibraryAddress; publishes: boolean }) {
  const { q, tag, status, page } = address.query;
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
  if (q || tag || status) {
    return (
      <EmptyState
        title={
          q ? `No interaction fits “${q}” and the filters.` : 'No interaction fits the filters.'
        }
        actions={
          <ButtonLink to="/library" size="small">
            Show the whole library
          </ButtonLink>
        }
      >
        The search looks at names, tags, descriptions, forms, particles and sources. A form that
        nobody has published stands in the Reference.
      </EmptyState>
    );
  }
  return (
    <EmptyState title="Nothing is published yet." actions={publishes && <NewInteraction />}>
      Theorists publish here the interactions the lab agrees on: terms with their numbers, where
      they hold and where they are from. A case that takes one cites its version and is told of a
      newer one.
    </EmptyState>
  );
}

/** The lab's published interactions. */
export default function LibraryPage() {
  const session = useSession();
  const publishes = mayEver(session, 'interaction.publish');
  const address = useLibraryAddress();
  const { data, error, isPlaceholderData, refetch } = useQuery(
    interactionListOptions(address.query),
  );
  return (
    <div className="flex flex-col gap-4">
      <div className="flex flex-col gap-1.5">
        <PageHead title="Library">{publishes && <NewInteraction />}</PageHead>
        <p className="max-w-[75ch] text-muted">
          Interactions published by the theorists of the lab, with their validity and source. A case
          cites the version it used.
        </p>
      </div>
      <Filters address={address} />
      {error && <Failure what="The library" error={error} onRetry={() => void refetch()} />}
      {!data && !error && <Placeholders />}
      {data && !error && (
        <>
          <p role="status" className="sr-only">
            {isPlaceholderData ? 'Searching …' : `${data.total} interactions found`}
          </p>
          {data.items.length === 0 && !isPlaceholderData ? (
            <NothingFound address={address} publishes={publishes} />
          ) : (
            <InteractionList items={data.items} address={address} dimmed={isPlaceholderData} />
          )}
          <Pagination
            page={data.page}
            pageSize={data.pageSize}
            total={data.total}
            noun="interactions"
            hrefOf={(page) => address.hrefWith({ page: page === 1 ? undefined : String(page) })}
          />
        </>
      )}
    </div>
  );
}
