import { useQuery } from '@tanstack/react-query';
import { useLocation, useParams, useSearchParams } from 'react-router-dom';
import { ButtonLink } from '#src/components/button.tsx';
import { EmptyState } from '#src/components/empty-state.tsx';
import { Failure } from '#src/components/failure.tsx';
import { PageTitle } from '#src/components/page-title.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { ApiError } from '#src/lib/api.ts';
import { caseWithHref, interactionVersionQuery } from '#src/lib/library.ts';
import { referenceStartOf, startHref, startQuery } from '#src/lib/reference-start.ts';
import type { ReferenceStart } from '#src/lib/reference-start.ts';
import { STARTS } from '#src/lib/starts.ts';
import { caseQuery, versionQuery } from '../api.ts';
import { VersionView } from '../components/version-view.tsx';
import { Workspace } from '../components/workspace.tsx';
import { contentOfCase } from '../editing/use-saving.ts';
import { documentWith } from '../model/citation.ts';
import { DEFAULT_DOCUMENT, DEFAULT_TITLE } from '../model/default-document.ts';
import { isCaseLink, linkName, openLink } from '../model/permalink.ts';

const NEW = { title: DEFAULT_TITLE, tags: [], document: DEFAULT_DOCUMENT };

function Loading() {
  return (
    <Waiting what="the case">
      <Skeleton className="mb-5 h-8 w-96 max-w-full" />
      <Skeleton className="mb-5 h-20" />
      <Skeleton className="h-96" />
    </Waiting>
  );
}

function Missing({ error, onRetry }: { error: unknown; onRetry: () => void }) {
  const code = error instanceof ApiError ? error.code : null;
  if (code !== 'notFound' && code !== 'invalidInput') {
    return <Failure what="The case" error={error} onRetry={onRetry} />;
  }
  return (
    <>
      <PageTitle title="Case not found" className="mb-4" />
      <EmptyState
        title="There is no such case, or it is not yours to read."
        actions={
          <ButtonLink to="/cases" look="primary">
            All cases
          </ButtonLink>
        }
      >
        A case is read by its owner, the members of its campaign and lab managers. Ask the owner to
        file it under a campaign you belong to.
      </EmptyState>
    </>
  );
}

/** Where a new case begins: at the plain default, or at one of the Desk's starts; each keeps unsaved work of its own. */
function newCase(parameters: URLSearchParams) {
  const start = STARTS.find(({ key }) => key === parameters.get('start'));
  if (start) {
    const { key, title, document } = start;
    const content = { title, tags: [], document };
    return { subject: `case:new:start-${key}`, href: `/cases/new?start=${key}`, content };
  }
  const name = parameters.get('draft');
  if (name === null) return { subject: 'case:new', href: '/cases/new', content: NEW };
  const href = `/cases/new?draft=${encodeURIComponent(name)}`;
  return { subject: `case:new:${name}`, href, content: NEW };
}

/** A new case with something from the Reference in it: the server, which has the tables, writes the document. */
function FromReference({ start }: { start: ReferenceStart }) {
  const { data, error, isError, refetch } = useQuery(startQuery(start));
  if (data) {
    const { title, document } = data;
    const subject = `case:new:${start.kind}-${start.name}`;
    return (
      <Workspace
        key={subject}
        subject={subject}
        href={startHref(start)}
        content={{ title, tags: [], document }}
        saved={null}
      />
    );
  }
  if (!isError) return <Loading />;
  return (
    <>
      <PageTitle title="New case" className="mb-4" />
      <Failure what="The entry of the Reference" error={error} onRetry={() => void refetch()} />
    </>
  );
}

/** A new case with a version of the library in it, in the collision it was published with. */
function FromLibrary({ id, n }: { id: string; n: number }) {
  const { data, error, isError, refetch } = useQuery(interactionVersionQuery(id, n));
  if (data) {
    const subject = `case:new:library-${id}-${n}`;
    const content = { title: data.name, tags: [], document: documentWith(data) };
    return (
      <Workspace
        key={subject}
        subject={subject}
        href={caseWithHref(data)}
        content={content}
        saved={null}
      />
    );
  }
  if (!isError) return <Loading />;
  return (
    <>
      <PageTitle title="New case" className="mb-4" />
      <Failure what="The interaction of the library" error={error} onRetry={() => void refetch()} />
    </>
  );
}

/** A case that stands in the address itself: it is unfolded and checked before anything is shown of it. */
function FromLink({ fragment }: { fragment: string }) {
  const opened = useQuery({
    queryKey: ['case link', fragment],
    queryFn: () => openLink(fragment),
    staleTime: Infinity,
  });
  if (!opened.data) return <Loading />;
  if ('content' in opened.data) {
    const subject = `case:new:${linkName(fragment)}`;
    const href = `/cases/new${fragment}`;
    const { content } = opened.data;
    return <Workspace key={subject} subject={subject} href={href} content={content} saved={null} />;
  }
  return (
    <>
      <PageTitle title="New case" className="mb-4" />
      <EmptyState
        title="This address opens no case."
        actions={
          <ButtonLink to="/cases/new" look="primary">
            Begin a new case
          </ButtonLink>
        }
      >
        {opened.data.problem}
      </EmptyState>
    </>
  );
}

function NewCase() {
  const [parameters] = useSearchParams();
  const { hash } = useLocation();
  if (isCaseLink(hash)) return <FromLink key={hash} fragment={hash} />;
  const interaction = parameters.get('interaction');
  if (interaction !== null) {
    return <FromLibrary id={interaction} n={Number(parameters.get('version') ?? '1')} />;
  }
  const start = referenceStartOf(parameters);
  if (start) return <FromReference start={start} />;
  return <PlainNewCase parameters={parameters} />;
}

function PlainNewCase({ parameters }: { parameters: URLSearchParams }) {
  const { subject, href, content } = newCase(parameters);
  return <Workspace key={subject} subject={subject} href={href} content={content} saved={null} />;
}

function SavedCase({ id }: { id: string }) {
  const query = useQuery(caseQuery(id));
  if (query.data) {
    const { data: detail, etag } = query.data;
    return (
      <Workspace
        key={id}
        subject={`case:${id}`}
        href={`/cases/${id}`}
        content={contentOfCase(detail)}
        saved={{ detail, etag: etag ?? '' }}
      />
    );
  }
  if (query.isError) return <Missing error={query.error} onRetry={() => void query.refetch()} />;
  return <Loading />;
}

function SavedVersion({ id, n }: { id: string; n: number }) {
  const current = useQuery(caseQuery(id));
  const version = useQuery(versionQuery(id, n));
  const failed = current.isError ? current : version.isError ? version : null;
  if (current.data && version.data) {
    const { data: detail, etag } = current.data;
    return <VersionView key={n} detail={detail} etag={etag ?? ''} version={version.data} />;
  }
  if (failed) return <Missing error={failed.error} onRetry={() => void failed.refetch()} />;
  return <Loading />;
}

/** One case: a new one, a saved one, or one of its older versions. */
export default function CasePage() {
  const { caseId, n } = useParams();
  if (caseId === undefined) return <NewCase />;
  if (n !== undefined) return <SavedVersion id={caseId} n={Number(n)} />;
  return <SavedCase id={caseId} />;
}
