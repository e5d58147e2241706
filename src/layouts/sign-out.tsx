import { useState } from 'react';
import { useMutation } from '@tanstack/react-query';
import { LogOut } from 'lucide-react';
import { Button } from '#src/components/button.tsx';
import { Dialog } from '#src/components/dialog.tsx';
import { signOut } from '#src/features/auth/api.ts';
import { ApiError, inWords } from '#src/lib/api.ts';
import { clearDrafts, listDrafts, type Draft } from '#src/lib/drafts.ts';
import { say } from '#src/lib/toasts.ts';

/** Ends the session; a full load afterwards, so that nothing of one person stays in memory for the next. */
async function leave(): Promise<void> {
  try {
    await signOut();
  } catch (error) {
    if (!(error instanceof ApiError) || error.code !== 'unauthenticated') throw error;
  }
  window.location.assign('/sign-in');
}

export function SignOut({ accountId }: { accountId: string }) {
  const [unsaved, setUnsaved] = useState<readonly Draft[]>([]);
  const mutation = useMutation({
    mutationFn: leave,
    onError: (error) => say(inWords(error), { tone: 'fault' }),
  });

  function begin() {
    const drafts = listDrafts(accountId);
    if (drafts.length === 0) mutation.mutate();
    else setUnsaved(drafts);
  }

  return (
    <>
      <Button look="quiet" size="small" busy={mutation.isPending} onClick={begin}>
        <LogOut aria-hidden="true" className="size-4" /> Sign out
      </Button>
      <Dialog
        open={unsaved.length > 0}
        onOpenChange={(open) => !open && setUnsaved([])}
        title="Unsaved work on this computer"
        description="It can wait here until you sign in again. On a computer you share, clear it: whoever uses this browser could read it."
        actions={
          <>
            <Button onClick={() => setUnsaved([])}>Stay signed in</Button>
            <Button
              look="danger"
              onClick={() => {
                clearDrafts(accountId);
                mutation.mutate();
              }}
            >
              Clear and sign out
            </Button>
            <Button look="primary" onClick={() => mutation.mutate()}>
              Keep and sign out
            </Button>
          </>
        }
      >
        <ul className="list-disc pl-5">
          {unsaved.map((draft) => (
            <li key={draft.key}>{draft.title}</li>
          ))}
        </ul>
      </Dialog>
    </>
  );
}
