import { useState, type FormEvent } from 'react';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { updateUserSchema, type User } from '#shared/contracts/users.ts';
import { Button } from '#src/components/button.tsx';
import { Dialog } from '#src/components/dialog.tsx';
import { Field, TextInput } from '#src/components/field.tsx';
import { Notice } from '#src/components/notice.tsx';
import { Select } from '#src/components/select.tsx';
import { inWords } from '#src/lib/api.ts';
import { faultsFrom, faultsOf, focusFirstFault, type Faults } from '#src/lib/form-faults.ts';
import { say } from '#src/lib/toasts.ts';
import { updateUser } from '../api.ts';
import { ROLE_CHOICES, ROLE_WORDS } from './role-words.ts';

type Changes = z.infer<typeof updateUserSchema>;

/** Only what differs is sent, so that two administrators do not undo each other. */
function changesOf(user: User, value: { name: string; role: User['role']; password: string }) {
  const changes: Changes = {};
  if (value.name.trim() !== user.name) changes.name = value.name;
  if (value.role !== user.role) changes.role = value.role;
  if (value.password !== '') changes.password = value.password;
  return changes;
}

function EditForm({ user, onDone }: { user: User; onDone: () => void }) {
  const client = useQueryClient();
  const [value, setValue] = useState({ name: user.name, role: user.role, password: '' });
  const [faults, setFaults] = useState<Faults>({});
  const mutation = useMutation({
    mutationFn: updateUser,
    onSuccess: async (changed) => {
      say(`${changed.name} is changed.`, { tone: 'sound' });
      onDone();
      await client.invalidateQueries({ queryKey: ['users'] });
    },
  });
  const refused = faultsFrom(mutation.error);

  function submit(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    const changes = changesOf(user, value);
    const found = faultsOf(updateUserSchema, changes);
    setFaults(found);
    if (focusFirstFault(event.currentTarget, found) || mutation.isPending) return;
    if (Object.keys(changes).length === 0) onDone();
    else mutation.mutate({ id: user.id, ...changes });
  }

  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-3">
      {mutation.error && Object.keys(refused).length === 0 && (
        <Notice live tone="fault" title="Nothing was changed.">
          {inWords(mutation.error)}
        </Notice>
      )}
      <Field label="Name" error={faults['name'] ?? refused['name']}>
        {(control) => (
          <TextInput
            {...control}
            name="name"
            autoComplete="off"
            value={value.name}
            onChange={(event) => setValue({ ...value, name: event.target.value })}
          />
        )}
      </Field>
      <Field label="Role" hint={ROLE_WORDS[value.role]} error={refused['role']}>
        {(control) => (
          <Select
            {...control}
            value={value.role}
            choices={ROLE_CHOICES}
            onChange={(role) => setValue({ ...value, role })}
          />
        )}
      </Field>
      {!user.demo && (
        <Field
          label="New password"
          hint="Leave it empty to keep the present one. A new one ends the person's sessions."
          error={faults['password'] ?? refused['password']}
        >
          {(control) => (
            <TextInput
              {...control}
              name="password"
              autoComplete="off"
              value={value.password}
              onChange={(event) => setValue({ ...value, password: event.target.value })}
            />
          )}
        </Field>
      )}
      <Button type="submit" look="primary" busy={mutation.isPending} className="mt-1 self-end">
        Save
      </Button>
    </form>
  );
}

export function EditPerson({ user, onClose }: { user: User | null; onClose: () => void }) {
  return (
    <Dialog
      open={user !== null}
      onOpenChange={(open) => !open && onClose()}
      title={user?.name ?? ''}
      description={user?.email ?? ''}
    >
      {user && <EditForm key={user.id} user={user} onDone={onClose} />}
    </Dialog>
  );
}
