import { ApiError } from '#src/lib/api.ts';
import { useSession } from '#src/lib/session.ts';
import type { FieldError } from '#shared/errors.ts';
import { useEditing } from '../editing/editor-context.ts';
import { useFiling, useSaving } from '../editing/use-saving.ts';
import { contentOf } from '../editing/use-work.ts';
import type { Work } from '../editing/use-work.ts';
import { differences } from '../model/fields.ts';
import { FileDialog } from './file-dialog.tsx';
import { SaveDialog } from './save-dialog.tsx';
import { StaleDialog } from './stale-dialog.tsx';
import type { Saved } from './workspace.tsx';

interface SaveFlowProps {
  open: boolean;
  onClose: () => void;
  work: Work;
  saved: Saved | null;
  subject: string;
  problems: readonly FieldError[];
}

/** The way from unsaved work to a version, whatever stands in it. */
export function SaveFlow({ saved, ...props }: SaveFlowProps) {
  return saved ? <VersionFlow {...props} saved={saved} /> : <FirstFlow {...props} />;
}

function FirstFlow({ open, onClose, work, subject, problems }: Omit<SaveFlowProps, 'saved'>) {
  const { user } = useSession();
  const filing = useFiling(work, user.id, subject);
  const draft = work.editor.state.present;
  if (!open) return null;
  return (
    <FileDialog
      title={draft.title}
      tags={draft.tags}
      problems={problems}
      busy={filing.isPending}
      error={filing.error}
      onClose={onClose}
      onFile={(choice) => filing.mutate(choice)}
    />
  );
}

function VersionFlow(props: Omit<SaveFlowProps, 'saved'> & { saved: Saved }) {
  const { open, onClose, work, saved, problems } = props;
  const { forms } = useEditing();
  const saving = useSaving(work, saved.detail.id);
  const { mutation, stale } = saving;
  const mine = contentOf(work.editor.state.present);
  const staleError = mutation.error instanceof ApiError && mutation.error.code === 'staleVersion';
  const close = () => {
    saving.leaveStale();
    mutation.reset();
    onClose();
  };

  if (stale) {
    return (
      <StaleDialog
        key={stale.etag}
        stale={stale}
        mine={mine}
        forms={forms}
        busy={mutation.isPending}
        error={staleError ? null : mutation.error}
        onClose={close}
        onSave={(merged) => saving.saveMerged(merged, onClose)}
      />
    );
  }
  if (!open) return null;
  return (
    <SaveDialog
      n={saved.detail.version.n + 1}
      tags={mine.tags}
      differences={work.base?.content ? differences(work.base.content, mine, forms) : null}
      problems={problems}
      busy={mutation.isPending || staleError}
      error={staleError ? null : mutation.error}
      onClose={close}
      onSave={(note, tags) => saving.save(note, tags, onClose)}
    />
  );
}
