import { isRouteErrorResponse, useRouteError } from 'react-router-dom';
import { Button, ButtonLink } from '#src/components/button.tsx';
import { Notice } from '#src/components/notice.tsx';
import { PageTitle } from '#src/components/page-title.tsx';
import { NotFound } from '#src/components/not-found.tsx';

function isStaleBuild(error: unknown): boolean {
  return error instanceof TypeError && /import|module/i.test(error.message);
}

/** Where a page breaks: what happened, what was kept, what to do. */
export function PageTrouble() {
  const error = useRouteError();
  if (isRouteErrorResponse(error) && error.status === 404) return <NotFound />;
  const stale = isStaleBuild(error);
  const reload = () => window.location.reload();
  return (
    <div className="mx-auto flex max-w-2xl flex-col gap-4 py-6">
      <PageTitle title={stale ? 'This page could not be fetched' : 'This page broke'} />
      <Notice
        tone="fault"
        live
        title={
          stale ? 'A part of the page did not arrive.' : 'A fault in the page, not in your work.'
        }
      >
        {stale
          ? 'The server may have been renewed since you opened this window, or the connection is gone. Reload to get the page as it is now.'
          : 'Unsaved work on a case is kept on this computer and offered again when you open the case.'}
      </Notice>
      <div className="flex gap-2">
        <Button look="primary" onClick={reload}>
          Reload the page
        </Button>
        <ButtonLink to="/">Go to the Desk</ButtonLink>
      </div>
      {error instanceof Error && (
        <details className="text-sm text-muted">
          <summary>What to tell whoever keeps this server</summary>
          <p className="mt-1 font-mono">{error.message}</p>
        </details>
      )}
    </div>
  );
}
