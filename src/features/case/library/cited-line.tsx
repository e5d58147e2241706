import { LibraryBig } from 'lucide-react';
import { Link } from 'react-router-dom';
import { Button } from '#src/components/button.tsx';
import { interactionHref } from '#src/lib/library.ts';
import { useEditing } from '../editing/editor-context.ts';
import { withoutCitation } from '../model/citation.ts';
import { useCited } from './use-cited.ts';

/** Where the terms below are from: name, version and source. */
export function CitedLine() {
  const { readOnly, editDocument } = useEditing();
  const found = useCited();
  if (!found) return null;
  const { citation, cited, missing } = found;
  const name = cited?.name ?? 'an interaction';
  return (
    <div className="flex gap-2 rounded bg-slate-soft px-3 py-2 text-sm">
      <LibraryBig aria-hidden="true" className="mt-0.5 size-4 shrink-0 text-slate" />
      <div className="min-w-0">
        <p>
          From the library:{' '}
          {missing ? (
            `version ${citation.version} of an interaction it does not have.`
          ) : (
            <Link
              to={interactionHref(citation.id, citation.version)}
              className="rounded font-semibold underline underline-offset-3"
            >
              {name}, version {citation.version}
            </Link>
          )}
        </p>
        {cited && <p className="text-muted">{cited.source}</p>}
        {missing && !readOnly && (
          <Button
            size="small"
            className="mt-1"
            onClick={() => editDocument('/interaction/citation', withoutCitation)}
          >
            Leave the citation out
          </Button>
        )}
        {!missing && !readOnly && (
          <p className="text-muted">Changing a term leaves the citation out.</p>
        )}
      </div>
    </div>
  );
}
