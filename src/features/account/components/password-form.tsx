import { useState, type FormEvent } from 'react';
import { useMutation } from '@tanstack/react-query';
import { changePasswordSchema } from '#shared/contracts/auth.ts';
import { Button } from '#src/components/button.tsx';
import { Field, TextInput } from '#src/components/field.tsx';
import { Notice } from '#src/components/notice.tsx';
import { inWords } from '#src/lib/api.ts';
import { faultsFrom, faultsOf, focusFirstFault, type Faults } from '#src/lib/form-faults.ts';
import { say } from '#src/lib/toasts.ts';
import { changePassword } from '../api.ts';

const EMPTY = { currentPassword: '', newPassword: '', again: '' };

function check({ again, ...body }: typeof EMPTY): Faults {
  const faults = faultsOf(changePasswordSchema, body);
  if (faults['newPassword'] || again === body.newPassword) return faults;
  return { ...faults, again: 'This is not the same as the new password; type it again.' };
}

export function PasswordForm() {
  const [value, setValue] = useState(EMPTY);
  const [faults, setFaults] = useState<Faults>({});
  const mutation = useMutation({
    mutationFn: changePassword,
    onSuccess: () => {
      setValue(EMPTY);
      say('Your password is changed.', { tone: 'sound' });
    },
  });
  const refused = faultsFrom(mutation.error);

  function submit(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    const found = check(value);
    setFaults(found);
    if (focusFirstFault(event.currentTarget, found) || mutation.isPending) return;
    mutation.mutate({ currentPassword: value.currentPassword, newPassword: value.newPassword });
  }

  const input = (name: keyof typeof EMPTY, label: string, complete: string, hint?: string) => (
    <Field label={label} hint={hint} error={faults[name] ?? refused[name]}>
      {(control) => (
        <TextInput
          {...control}
          name={name}
          type="password"
          autoComplete={complete}
          value={value[name]}
          onChange={(event) => setValue({ ...value, [name]: event.target.value })}
        />
      )}
    </Field>
  );

  return (
    <form onSubmit={submit} noValidate className="flex max-w-sm flex-col gap-3">
      {mutation.error && Object.keys(refused).length === 0 && (
        <Notice live tone="fault" title="The password is not changed.">
          {inWords(mutation.error)}
        </Notice>
      )}
      {input('currentPassword', 'Current password', 'current-password')}
      {input('newPassword', 'New password', 'new-password', 'At least 12 characters.')}
      {input('again', 'New password again', 'new-password')}
      <Button type="submit" busy={mutation.isPending} className="self-start">
        Change password
      </Button>
    </form>
  );
}
