import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import type { InteractionDetail, InteractionVersion } from '#shared/contracts/library.ts';
import { ButtonLink } from '#src/components/button.tsx';
import { EmptyState } from '#src/components/empty-state.tsx';
import { Failure } from '#src/components/failure.tsx';
import { Notice } from '#src/components/notice.tsx';
import { PageHead } from '#src/components/page-head.tsx';
import { PageTitle } from '#src/components/page-title.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { When } from '#src/components/when.tsx';
import { ApiError } from '#src/lib/api.ts';
import { interactionHref, interactionQuery, interactionVersionQuery } from '#src/lib/library.ts';
import { CitedBy } from '../components/cited-by.tsx';
import { Deeds } from '../components/deeds.tsx';
import { RetiredChip } from '../components/interaction-list.tsx';
import { Versions } from '../components/versions.tsx';
import { WhatItIs } from '../components/what-it-is.tsx';

function Loading() {
  return (
    <Waiting what="the interaction">
      <Skeleton className="mb-4 h-8 w-80 max-w-full" />
      <Skeleton className="mb-4 h-24" />
      <Skeleton className="h-56" />
    </Waiting>
  );
}

function Missing({ error, onRetry }: { error: unknown; onRetry: () => void }) {
  if (!(error instanceof ApiError) || error.code !== 'notFound') {
    return <Failure what="The interaction" error={error} onRetry={onRetry} />;
  }
  return (
    <>
      <PageTitle title="Interaction not found" className="mb-4" />
      <EmptyState
        title="The library has no such interaction or version."
        actions={
          <ButtonLink to="/library" look="primary">
            The whole library
          </ButtonLink>
        }
      >
        Nothing is ever taken out of the library: look at the address again.
      </EmptyState>
    </>
  );
}

function Meta({ shown, newest }: { shown: InteractionVersion; newest: InteractionDetail }) {
  const { version, owner } = shown;
  return (
    <p className="flex flex-wrap items-center gap-x-2 gap-y-1 text-sm text-muted">
      <Link to="/library" className="rounded underline underline-offset-3 hover:text-ink">
        Library
      </Link>
      <span>
        · version {version.n} of {newest.newestVersion}, published by {version.author.name},{' '}
        <When iso={version.createdAt} />
        {owner.id !== version.author.id && ` · first by ${owner.name}`}
      </span>
      {newest.status === 'retired' && <RetiredChip />}
    </p>
  );
}

function Notices({ shown, newest }: { shown: InteractionVersion; newest: InteractionDetail }) {
  const { retired, newestVersion, id } = newest;
  return (
    <>
      {retired && (
        <Notice tone="attention" title={`Retired by ${retired.by.name}.`}>
          {retired.reason}
        </Notice>
      )}
      {shown.version.n < newestVersion && (
        <Notice
          tone="info"
          title={`Version ${shown.version.n}, as it was published.`}
          actions={
            <ButtonLink size="small" to={interactionHref(id)}>
              Open version {newestVersion}
            </ButtonLink>
          }
        >
          The newest is version {newestVersion}; what changed is listed below.
        </Notice>
      )}
    </>
  );
}

interface SheetProps {
  newest: InteractionDetail;
  etag: string;
  shown: InteractionVersion;
}

function Sheet({ newest, etag, shown }: SheetProps) {
  return (
    <>
      <div className="flex flex-col gap-1">
        <Meta shown={shown} newest={newest} />
        <PageHead title={shown.name}>
          <Deeds newest={newest} etag={etag} shown={shown} />
        </PageHead>
      </div>
      <div className="flex flex-col gap-3 empty:hidden">
        <Notices shown={shown} newest={newest} />
      </div>
      <WhatItIs interaction={shown} />
      <Versions interaction={newest} shown={shown.version.n} />
      <CitedBy id={newest.id} newest={newest.newestVersion} />
    </>
  );
}

function Older({ n, ...rest }: Omit<SheetProps, 'shown'> & { n: number }) {
  const { data, error, refetch } = useQuery(interactionVersionQuery(rest.newest.id, n));
  if (data) return <Sheet {...rest} shown={data} />;
  return error ? <Missing error={error} onRetry={() => void refetch()} /> : <Loading />;
}

/** One interaction of the library, at its newest version or at the one of the address. */
export default function InteractionPage() {
  const { id = '', n } = useParams();
  const { data, error, refetch } = useQuery(interactionQuery(id));
  const asked = n === undefined ? null : Number(n);
  return (
    <div className="flex flex-col gap-6">
      {!data && (error ? <Missing error={error} onRetry={() => void refetch()} /> : <Loading />)}
      {data &&
        (asked === null || asked === data.data.newestVersion ? (
          <Sheet newest={data.data} etag={data.etag ?? ''} shown={data.data} />
        ) : (
          <Older newest={data.data} etag={data.etag ?? ''} n={asked} />
        ))}
    </div>
  );
}
