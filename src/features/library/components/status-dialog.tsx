import { useState } from 'react';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { InteractionDetail } from '#shared/contracts/library.ts';
import { ConfirmDialog } from '#src/components/confirm-dialog.tsx';
import { Field, TextArea } from '#src/components/field.tsx';
import { Notice } from '#src/components/notice.tsx';
import { inWords } from '#src/lib/api.ts';
import { changeInteractionStatus, forgetLibrary } from '#src/lib/library.ts';
import { say } from '#src/lib/toasts.ts';

const WORDS = {
  retire: {
    title: 'Retire the interaction',
    description:
      'It leaves the list and can no longer be taken into a case. Its versions stay, and the cases that cite it say that it is retired.',
    confirm: 'Retire',
    done: 'is retired',
  },
  reinstate: {
    title: 'Take the interaction back',
    description: 'It stands in the list again, with all its versions.',
    confirm: 'Take back',
    done: 'is in the library again',
  },
} as const;

interface StatusDialogProps {
  interaction: InteractionDetail;
  etag: string;
  onClose: () => void;
}

/** Retiring an interaction, or taking a retired one back, each with a reason. */
export function StatusDialog({ interaction, etag, onClose }: StatusDialogProps) {
  const [deed] = useState<keyof typeof WORDS>(
    interaction.status === 'retired' ? 'reinstate' : 'retire',
  );
  const words = WORDS[deed];
  const client = useQueryClient();
  const [reason, setReason] = useState('');
  const [tried, setTried] = useState(false);
  const missing = reason.trim() === '';
  const mutation = useMutation({
    mutationFn: () => changeInteractionStatus(interaction.id, deed, { reason, etag }),
    onSuccess: async () => {
      say(`“${interaction.name}” ${words.done}.`, { tone: 'sound' });
      await forgetLibrary(client);
      onClose();
    },
  });
  return (
    <ConfirmDialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={words.title}
      description={words.description}
      confirm={words.confirm}
      look={deed === 'retire' ? 'danger' : 'primary'}
      busy={mutation.isPending}
      onConfirm={() => {
        setTried(true);
        if (!missing) mutation.mutate();
      }}
    >
      <Field
        label="Reason"
        error={tried && missing ? 'Say why: those whose cases cite it will ask.' : undefined}
      >
        {(control) => (
          <TextArea
            {...control}
            data-autofocus
            rows={2}
            maxLength={2000}
            value={reason}
            onChange={({ target }) => setReason(target.value)}
          />
        )}
      </Field>
      {mutation.error && (
        <Notice live tone="fault" title="Nothing was changed.">
          {inWords(mutation.error)}
        </Notice>
      )}
    </ConfirmDialog>
  );
}
