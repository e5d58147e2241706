import { useState } from 'react';
import { Button } from '#src/components/button.tsx';
import { Dialog } from '#src/components/dialog.tsx';
import { DifferenceTable } from '#src/components/difference-table.tsx';
import type { Difference } from '#src/components/difference-table.tsx';
import { Field, TextArea } from '#src/components/field.tsx';
import { Notice } from '#src/components/notice.tsx';
import type { FieldError } from '#shared/errors.ts';
import { inWords } from '#src/lib/api.ts';
import { TagsField, tagsOf, tagsProblem } from '#src/components/tags-field.tsx';
import { Unsound } from './open-texts.tsx';

interface SaveDialogProps {
  /** Number the new version will have, if nobody is faster. */
  n: number;
  tags: readonly string[];
  /** What this save changes; null where the version it rests on is not at hand. */
  differences: readonly Difference[] | null;
  problems: readonly FieldError[];
  busy: boolean;
  error: unknown;
  onClose: () => void;
  onSave: (note: string, tags: string[]) => void;
}

/** Saving a version: what changed is shown, and why may be said. */
export function SaveDialog(props: SaveDialogProps) {
  const { n, differences, problems, busy, error, onClose, onSave } = props;
  const [note, setNote] = useState('');
  const [tags, setTags] = useState(props.tags.join(', '));
  const list = tagsOf(tags);
  const ready = problems.length === 0 && tagsProblem(list) === undefined;

  return (
    <Dialog
      open
      width="wide"
      onOpenChange={(open) => !open && onClose()}
      title={`Save version ${n}`}
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button look="primary" type="submit" form="save-version" busy={busy}>
            Save version {n}
          </Button>
        </>
      }
    >
      <form
        id="save-version"
        className="flex flex-col gap-3.5"
        onSubmit={(event) => {
          event.preventDefault();
          if (ready && !busy) onSave(note.trim(), list);
        }}
      >
        <Unsound problems={problems} />
        {differences !== null && differences.length > 0 && (
          <section aria-label="What this version changes" className="rounded bg-soft px-3 py-1.5">
            <DifferenceTable differences={differences} />
          </section>
        )}
        {differences?.length === 0 && (
          <p className="text-muted">
            Nothing differs from the version before; it is saved as it is.
          </p>
        )}
        <Field label="Note: why? (may be empty)">
          {(control) => (
            <TextArea
              {...control}
              data-autofocus
              rows={2}
              maxLength={2000}
              value={note}
              onChange={(event) => setNote(event.target.value)}
              onKeyDown={(event) => {
                // Ctrl+S, Ctrl+S and Ctrl+Enter save from here.
                const key = event.key.toLowerCase();
                if ((event.ctrlKey || event.metaKey) && (key === 's' || key === 'enter')) {
                  event.preventDefault();
                  event.currentTarget.form?.requestSubmit();
                }
              }}
            />
          )}
        </Field>
        <TagsField text={tags} onText={setTags} />
        {error !== null && (
          <Notice live tone="fault" title="Nothing was saved. What you typed is kept.">
            {inWords(error)}
          </Notice>
        )}
      </form>
    </Dialog>
  );
}
