import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { User } from '#shared/contracts/users.ts';
import { ConfirmDialog } from '#src/components/confirm-dialog.tsx';
import { Notice } from '#src/components/notice.tsx';
import { inWords } from '#src/lib/api.ts';
import { say } from '#src/lib/toasts.ts';
import { updateUser } from '../api.ts';

/** Deactivates an account after asking, or lets it in again. */
export function ActivityDialog({ user, onClose }: { user: User | null; onClose: () => void }) {
  const client = useQueryClient();
  const mutation = useMutation({
    mutationFn: updateUser,
    onSuccess: async (changed) => {
      say(`${changed.name} is ${changed.active ? 'active again' : 'deactivated'}.`, {
        tone: 'sound',
      });
      onClose();
      await client.invalidateQueries({ queryKey: ['users'] });
    },
  });
  const leaving = user?.active ?? true;
  function close() {
    mutation.reset();
    onClose();
  }
  return (
    <ConfirmDialog
      open={user !== null}
      onOpenChange={(open) => !open && close()}
      title={leaving ? `Deactivate ${user?.name ?? ''}?` : `Let ${user?.name ?? ''} in again?`}
      description={
        leaving
          ? 'Their sessions end now and their tokens are revoked. Their cases and their name in the trail stay.'
          : 'They can sign in with their last password. Revoked tokens stay revoked.'
      }
      confirm={leaving ? 'Deactivate' : 'Activate'}
      look={leaving ? 'danger' : 'primary'}
      busy={mutation.isPending}
      onConfirm={() => user && mutation.mutate({ id: user.id, active: !user.active })}
    >
      {mutation.error && (
        <Notice live tone="fault" title="Nothing was changed.">
          {inWords(mutation.error)}
        </Notice>
      )}
    </ConfirmDialog>
  );
}
