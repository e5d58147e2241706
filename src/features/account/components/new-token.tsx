import { useState, type FormEvent } from 'react';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { createTokenSchema } from '#shared/contracts/auth.ts';
import { Button } from '#src/components/button.tsx';
import { CopyField } from '#src/components/copy-field.tsx';
import { Dialog } from '#src/components/dialog.tsx';
import { Field, TextInput } from '#src/components/field.tsx';
import { Notice } from '#src/components/notice.tsx';
import { Select } from '#src/components/select.tsx';
import { inWords } from '#src/lib/api.ts';
import { faultsFrom, faultsOf, focusFirstFault, type Faults } from '#src/lib/form-faults.ts';
import { createToken, tokensQuery } from '../api.ts';

const LIFETIMES = [
  { value: '7', label: '7 days' },
  { value: '30', label: '30 days' },
  { value: '90', label: '90 days' },
  { value: '365', label: 'a year' },
] as const;
const SCOPES = [
  { value: 'read', label: 'read: look at cases, compute estimates' },
  { value: 'write', label: 'read and write: save cases too' },
] as const;

type Lifetime = (typeof LIFETIMES)[number]['value'];
type Scope = (typeof SCOPES)[number]['value'];

function MakeToken({ onMade }: { onMade: (secret: string) => void }) {
  const client = useQueryClient();
  const [name, setName] = useState('');
  const [scope, setScope] = useState<Scope>('read');
  const [days, setDays] = useState<Lifetime>('30');
  const [faults, setFaults] = useState<Faults>({});
  const mutation = useMutation({
    mutationFn: createToken,
    onSuccess: async ({ secret }) => {
      onMade(secret);
      await client.invalidateQueries({ queryKey: tokensQuery.queryKey });
    },
  });
  const refused = faultsFrom(mutation.error);

  function submit(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    const body = { name, scope, expiresInDays: Number(days) };
    const found = faultsOf(createTokenSchema, body);
    setFaults(found);
    if (focusFirstFault(event.currentTarget, found) || mutation.isPending) return;
    mutation.mutate(body);
  }

  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-3">
      {mutation.error && Object.keys(refused).length === 0 && (
        <Notice live tone="fault" title="No token was made.">
          {inWords(mutation.error)}
        </Notice>
      )}
      <Field
        label="Name"
        hint="Where it is used, such as “shift laptop, energy sweep”."
        error={faults['name'] ?? refused['name']}
      >
        {(control) => (
          <TextInput
            {...control}
            data-autofocus
            name="name"
            maxLength={80}
            autoComplete="off"
            value={name}
            onChange={(event) => setName(event.target.value)}
          />
        )}
      </Field>
      <Field label="It may">
        {(control) => <Select {...control} value={scope} choices={SCOPES} onChange={setScope} />}
      </Field>
      <Field label="It is good for">
        {(control) => <Select {...control} value={days} choices={LIFETIMES} onChange={setDays} />}
      </Field>
      <Button type="submit" look="primary" busy={mutation.isPending} className="mt-1 self-end">
        Make the token
      </Button>
    </form>
  );
}

/** Makes a token; its secret is shown here once and never again. */
export function NewToken({
  open,
  onOpenChange,
}: {
  open: boolean;
  onOpenChange: (open: boolean) => void;
}) {
  const [secret, setSecret] = useState<string | null>(null);
  function close() {
    setSecret(null);
    onOpenChange(false);
  }
  return (
    <Dialog
      open={open}
      onOpenChange={(next) => !next && close()}
      title={secret ? 'Your new token' : 'New token'}
      description={
        secret
          ? 'Copy it now: only its fingerprint is kept here, so it can never be shown again.'
          : 'A script sends it as “Authorization: Bearer TOKEN” and then acts as you.'
      }
      actions={
        secret && (
          <Button look="primary" onClick={close}>
            I have copied it
          </Button>
        )
      }
    >
      {secret ? <CopyField label="Token" value={secret} /> : <MakeToken onMade={setSecret} />}
    </Dialog>
  );
}
