import { useState } from 'react';
import { Trash2 } from 'lucide-react';
import { Link } from 'react-router-dom';
import { IconButton } from '#src/components/button.tsx';
import { When } from '#src/components/when.tsx';
import { clearDraft, listDrafts, saveDraft, type Draft } from '#src/lib/drafts.ts';
import { say } from '#src/lib/toasts.ts';

/** What was typed on this computer and never saved; nothing is shown where there is nothing. */
export function UnsavedWork({ accountId }: { accountId: string }) {
  const [drafts, setDrafts] = useState(() => listDrafts(accountId));
  if (drafts.length === 0) return null;

  function drop(draft: Draft) {
    clearDraft(accountId, draft.key);
    setDrafts(listDrafts(accountId));
    say(`Unsaved work on “${draft.title}” was dropped.`, {
      action: {
        label: 'Undo',
        run: () => {
          saveDraft(accountId, draft);
          setDrafts(listDrafts(accountId));
        },
      },
    });
  }

  return (
    <section aria-labelledby="unsaved">
      <h2 id="unsaved" className="mb-2 text-lg font-semibold">
        Unsaved on this computer
      </h2>
      <ul className="divide-y divide-line rounded border border-line bg-straw-soft px-4">
        {drafts.map((draft) => (
          <li key={draft.key} className="flex items-center justify-between gap-3 py-1.5">
            <Link to={draft.href} className="min-w-0 rounded font-semibold hover:underline">
              {draft.title}
            </Link>
            <span className="flex items-center gap-2 text-sm">
              <When iso={draft.savedAt} />
              <IconButton label={`Drop unsaved work on ${draft.title}`} onClick={() => drop(draft)}>
                <Trash2 aria-hidden="true" className="size-4" />
              </IconButton>
            </span>
          </li>
        ))}
      </ul>
    </section>
  );
}
