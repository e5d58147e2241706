import { useState } from 'react';
import { useQueryClient } from '@tanstack/react-query';
import type { User } from '#shared/contracts/users.ts';
import { Button } from '#src/components/button.tsx';
import { Dialog } from '#src/components/dialog.tsx';
import { Notice } from '#src/components/notice.tsx';
import { SignInForm } from '#src/features/auth/components/sign-in-form.tsx';
import type { Credentials } from '#src/features/auth/api.ts';
import {
  askForSession,
  sessionDeclined,
  sessionRegained,
  useSessionLoss,
} from '#src/lib/session-loss.ts';

/** Signs in over the page that lost its session; another person's sign-in begins afresh at the same address. */
export function SessionLost({ user }: { user: User }) {
  const loss = useSessionLoss();
  const client = useQueryClient();
  const [value, setValue] = useState<Credentials>({ email: user.email, password: '' });

  function signedIn(newcomer: User) {
    setValue({ email: user.email, password: '' });
    if (newcomer.id !== user.id) {
      window.location.reload();
      return;
    }
    sessionRegained();
    void client.invalidateQueries();
  }

  return (
    <>
      {loss === 'declined' && (
        <Notice
          live
          tone="attention"
          className="m-4"
          title="You are signed out."
          actions={<Button onClick={askForSession}>Sign in again</Button>}
        >
          What you typed is kept in this window, but nothing can be computed or saved.
        </Notice>
      )}
      <Dialog
        open={loss === 'asking'}
        onOpenChange={(open) => !open && sessionDeclined()}
        title="Sign in again"
        description="Your session has ended. Sign in, and this page goes on where it stands; nothing on it is lost."
      >
        <SignInForm value={value} onChange={setValue} onSignedIn={signedIn} />
      </Dialog>
    </>
  );
}
