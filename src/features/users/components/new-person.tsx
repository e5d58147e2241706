import { useState, type FormEvent } from 'react';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { createUserSchema } from '#shared/contracts/users.ts';
import type { Role } from '#shared/roles.ts';
import { Button } from '#src/components/button.tsx';
import { Dialog } from '#src/components/dialog.tsx';
import { Field, TextInput } from '#src/components/field.tsx';
import { Notice } from '#src/components/notice.tsx';
import { Select } from '#src/components/select.tsx';
import { inWords } from '#src/lib/api.ts';
import { faultsFrom, faultsOf, focusFirstFault, type Faults } from '#src/lib/form-faults.ts';
import { say } from '#src/lib/toasts.ts';
import { createUser } from '../api.ts';
import { ROLE_CHOICES, ROLE_WORDS } from './role-words.ts';

const EMPTY = { name: '', email: '', password: '', role: 'experimentalist' as Role };

function PersonForm({ onMade }: { onMade: () => void }) {
  const client = useQueryClient();
  const [value, setValue] = useState(EMPTY);
  const [faults, setFaults] = useState<Faults>({});
  const mutation = useMutation({
    mutationFn: createUser,
    onSuccess: async (user) => {
      say(`${user.name} can sign in now.`, { tone: 'sound' });
      onMade();
      await client.invalidateQueries({ queryKey: ['users'] });
    },
  });
  const refused = faultsFrom(mutation.error);

  function submit(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    const found = faultsOf(createUserSchema, value);
    setFaults(found);
    if (focusFirstFault(event.currentTarget, found) || mutation.isPending) return;
    mutation.mutate(value);
  }

  const input = (
    name: 'name' | 'email' | 'password',
    label: string,
    rest: { type?: string; hint?: string; autofocus?: boolean } = {},
  ) => (
    <Field label={label} hint={rest.hint} error={faults[name] ?? refused[name]}>
      {(control) => (
        <TextInput
          {...control}
          {...(rest.autofocus ? { 'data-autofocus': true } : {})}
          name={name}
          type={rest.type ?? 'text'}
          autoComplete="off"
          value={value[name]}
          onChange={(event) => setValue({ ...value, [name]: event.target.value })}
        />
      )}
    </Field>
  );

  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-3">
      {mutation.error && Object.keys(refused).length === 0 && (
        <Notice live tone="fault" title="No account was made.">
          {inWords(mutation.error)}
        </Notice>
      )}
      {input('name', 'Name', { autofocus: true })}
      {input('email', 'E-mail', { type: 'email' })}
      <Field label="Role" hint={ROLE_WORDS[value.role]}>
        {(control) => (
          <Select
            {...control}
            value={value.role}
            choices={ROLE_CHOICES}
            onChange={(role) => setValue({ ...value, role })}
          />
        )}
      </Field>
      {input('password', 'First password', {
        hint: 'At least 12 characters. Hand it over yourself; it can be changed under Account.',
      })}
      <Button type="submit" look="primary" busy={mutation.isPending} className="mt-1 self-end">
        Create the account
      </Button>
    </form>
  );
}

export function NewPerson({
  open,
  onOpenChange,
}: {
  open: boolean;
  onOpenChange: (open: boolean) => void;
}) {
  return (
    <Dialog open={open} onOpenChange={onOpenChange} title="New account">
      <PersonForm onMade={() => onOpenChange(false)} />
    </Dialog>
  );
}
