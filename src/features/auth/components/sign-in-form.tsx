import { useState, type FormEvent } from 'react';
import { useMutation } from '@tanstack/react-query';
import { signInSchema } from '#shared/contracts/auth.ts';
import type { User } from '#shared/contracts/users.ts';
import { Button } from '#src/components/button.tsx';
import { Field, TextInput } from '#src/components/field.tsx';
import { Notice } from '#src/components/notice.tsx';
import { ApiError, inWords } from '#src/lib/api.ts';
import { signIn, type Credentials } from '../api.ts';

interface SignInFormProps {
  value: Credentials;
  onChange: (value: Credentials) => void;
  onSignedIn: (user: User) => void;
}

type Faults = Partial<Record<keyof Credentials, string>>;

function faultsOf(value: Credentials): Faults {
  const parsed = signInSchema.safeParse(value);
  const faults: Faults = {};
  for (const issue of parsed.error?.issues ?? []) {
    const key = issue.path[0];
    if (key === 'email' || key === 'password') faults[key] ??= issue.message;
  }
  return faults;
}

export function SignInForm({ value, onChange, onSignedIn }: SignInFormProps) {
  const [faults, setFaults] = useState<Faults>({});
  const mutation = useMutation({ mutationFn: signIn, onSuccess: ({ user }) => onSignedIn(user) });
  const refusal = mutation.error instanceof ApiError ? mutation.error : null;

  function submit(event: FormEvent<HTMLFormElement>) {
    event.preventDefault();
    const found = faultsOf(value);
    setFaults(found);
    const first = found.email ? 'email' : found.password ? 'password' : null;
    if (first) event.currentTarget.querySelector<HTMLInputElement>(`[name=${first}]`)?.focus();
    else if (!mutation.isPending) mutation.mutate(value);
  }

  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      {mutation.error && (
        <Notice live tone="fault" title="Not signed in.">
          {inWords(mutation.error)}
        </Notice>
      )}
      <Field label="E-mail" error={faults.email ?? refusal?.at('/email')}>
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
      <Field label="Password" error={faults.password ?? refusal?.at('/password')}>
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
