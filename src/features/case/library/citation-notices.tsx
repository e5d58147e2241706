import { useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { InteractionVersion } from '#shared/contracts/library.ts';
import { Button, ButtonLink } from '#src/components/button.tsx';
import { DifferenceTable } from '#src/components/difference-table.tsx';
import { Dialog } from '#src/components/dialog.tsx';
import { Notice } from '#src/components/notice.tsx';
import { When } from '#src/components/when.tsx';
import { formsQuery } from '#src/lib/forms.ts';
import { interactionDifferences } from '#src/lib/interaction-words.ts';
import { interactionHref } from '#src/lib/library.ts';
import { say } from '#src/lib/toasts.ts';
import { useEditing } from '../editing/editor-context.ts';
import { outsideValidity, takeInteraction } from '../model/citation.ts';
import { useCited } from './use-cited.ts';

interface NewerProps {
  cited: InteractionVersion;
  newest: InteractionVersion;
}

function TakeDialog({ cited, newest, onClose }: NewerProps & { onClose: () => void }) {
  const { edit } = useEditing();
  const forms = useQuery(formsQuery).data ?? [];
  const found = interactionDifferences(cited, newest, forms);
  const n = newest.version.n;
  return (
    <Dialog
      open
      width="wide"
      onOpenChange={(open) => !open && onClose()}
      title={`From version ${cited.version.n} to version ${n}`}
      description={
        newest.version.note === ''
          ? `What changed in “${newest.name}”.`
          : `“${newest.version.note}”`
      }
      actions={
        <>
          <Button onClick={onClose}>Keep version {cited.version.n}</Button>
          <Button
            look="primary"
            onClick={() => {
              edit('take version', (draft) => takeInteraction(draft, newest));
              say(`Version ${n} is taken, unsaved. Undo brings version ${cited.version.n} back.`);
              onClose();
            }}
          >
            Take version {n}
          </Button>
        </>
      }
    >
      {found.length === 0 ? (
        <p className="text-muted">Nothing differs between the two.</p>
      ) : (
        <DifferenceTable differences={found} />
      )}
    </Dialog>
  );
}

function Newer({ cited, newest }: NewerProps) {
  const { readOnly } = useEditing();
  const [open, setOpen] = useState(false);
  const { n, author, createdAt } = newest.version;
  return (
    <>
      <Notice
        tone="attention"
        title={`Version ${n} of “${newest.name}” is in the library.`}
        actions={
          readOnly ? (
            <ButtonLink size="small" to={interactionHref(newest.id)}>
              Open version {n}
            </ButtonLink>
          ) : (
            <Button size="small" onClick={() => setOpen(true)}>
              Take version {n} …
            </Button>
          )
        }
      >
        This case cites version {cited.version.n}. {author.name} published version {n},{' '}
        <When iso={createdAt} />; nothing here changes by itself.
      </Notice>
      {open && <TakeDialog cited={cited} newest={newest} onClose={() => setOpen(false)} />}
    </>
  );
}

function Outside({ cited }: { cited: InteractionVersion }) {
  const { draft } = useEditing();
  const words = outsideValidity(draft.document, cited.validity);
  if (words.length === 0) return null;
  return (
    <Notice tone="attention" title={`This beam is not one “${cited.name}” was published for.`}>
      {words.map((line) => (
        <p key={line}>{line}</p>
      ))}
    </Notice>
  );
}

/** What became of the interaction since the case took it, and whether the beam still is one it was published for. */
export function CitationNotices() {
  const found = useCited();
  if (!found?.newest) return null;
  const { newest, cited } = found;
  const { retired } = newest;
  return (
    <>
      {retired && (
        <Notice tone="attention" title={`“${newest.name}” is retired from the library.`}>
          {retired.by.name}: {retired.reason}
        </Notice>
      )}
      {!retired && cited && cited.version.n < newest.newestVersion && (
        <Newer cited={cited} newest={newest} />
      )}
      {cited && <Outside cited={cited} />}
    </>
  );
}
