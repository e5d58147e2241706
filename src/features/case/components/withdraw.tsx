import { useState } from 'react';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { Button } from '#src/components/button.tsx';
import { ConfirmDialog } from '#src/components/confirm-dialog.tsx';
import { Field, TextArea } from '#src/components/field.tsx';
import { Notice } from '#src/components/notice.tsx';
import { inWords } from '#src/lib/api.ts';
import { say } from '#src/lib/toasts.ts';
import { withdrawCase } from '../api.ts';

interface WithdrawProps {
  caseId: string;
  n: number;
  etag: string;
}

/** Takes the newest version out of work, with a reason that stays in the record. */
export function Withdraw({ caseId, n, etag }: WithdrawProps) {
  const [open, setOpen] = useState(false);
  const [reason, setReason] = useState('');
  const client = useQueryClient();
  const withdraw = useMutation({
    mutationFn: () => withdrawCase(caseId, reason.trim(), etag),
    onSuccess: async () => {
      setOpen(false);
      setReason('');
      say(`Version ${n} is withdrawn. The case and its history stay.`, { tone: 'sound' });
      await client.invalidateQueries({ queryKey: ['case', caseId] });
    },
  });
  return (
    <>
      <Button look="danger" size="small" onClick={() => setOpen(true)}>
        Withdraw version {n} …
      </Button>
      <ConfirmDialog
        open={open}
        onOpenChange={setOpen}
        title={`Withdraw version ${n}?`}
        description="It leaves the work in hand; the case, its versions and the reason stay in the record. A later version can be saved on top."
        confirm={`Withdraw version ${n}`}
        busy={withdraw.isPending}
        onConfirm={() => {
          if (reason.trim() !== '') withdraw.mutate();
        }}
      >
        <Field
          label="Reason"
          error={withdraw.isError ? inWords(withdraw.error) : undefined}
          hint={reason.trim() === '' ? 'A reason is needed.' : undefined}
        >
          {(control) => (
            <TextArea
              {...control}
              data-autofocus
              maxLength={2000}
              value={reason}
              onChange={(event) => setReason(event.target.value)}
            />
          )}
        </Field>
      </ConfirmDialog>
    </>
  );
}

export function NothingFiled() {
  return (
    <Notice tone="info" title="Nothing is on record yet.">
      Once the case is saved, every version stands here with its author, time, note and hash, with
      the result as it was computed, and with what changed from one to the next.
    </Notice>
  );
}
