import { useState, type FormEvent } from 'react';
import { useMutation } from '@tanstack/react-query';
import { signInSchema } from '#shared/contracts/auth.ts';
import type { User } from '#shared/contracts/users.ts';
import { Button } from '#src/components/button.tsx';
import { Field, TextInput } from '#src/components/field.tsx';
import { Notice } from '#src/components/notice.tsx';
import { inWords } from '#src/lib/api.ts';
import { faultsFrom, faultsOf, focusFirstFault, type Faults } from '#src/lib/form-faults.ts';
import { signIn, type Credentials } from '../api.ts';

interface SignInFormProps {
  value: Credentials;
  onChange: (value: Credentials) => void;
  onSignedIn: (user: User) => void;
}

export function SignInForm({ value, onChange, onSignedIn }: SignInFormProps) {
  const [faults, setFaults] = useState<Faults>({});
  const mutation = useMutation({ mutationFn: signIn, onSuccess: ({ user }) => onSignedIn(user) });
  const refused = faultsFrom(mutation.error);

  function submit(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    const found = faultsOf(signInSchema, value);
    setFaults(found);
    if (focusFirstFault(event.currentTarget, found) || mutation.isPending) return;
    mutation.mutate(value);
  }

  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      {mutation.error && (
        <Notice live tone="fault" title="Not signed in.">
          {inWords(mutation.error)}
        </Notice>
      )}
      <Field label="E-mail" error={faults['email'] ?? refused['email']}>
        {(control) => (
          <TextInput
            {...control}
            name="email"
            type="email"
            autoComplete="username"
            value={value.email}
            onChange={(event) => onChange({ ...value, email: event.target.value })}
          />
        )}
      </Field>
      <Field label="Password" error={faults['password'] ?? refused['password']}>
        {(control) => (
          <TextInput
            {...control}
            name="password"
            type="password"
            autoComplete="current-password"
            value={value.password}
            onChange={(event) => onChange({ ...value, password: event.target.value })}
          />
        )}
      </Field>
      <Button type="submit" look="primary" busy={mutation.isPending}>
        Sign in
      </Button>
    </form>
  );
}
