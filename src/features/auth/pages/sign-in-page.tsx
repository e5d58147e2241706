import { useRef, useState } from 'react';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { Navigate, useNavigate, useSearchParams } from 'react-router-dom';
import { Mark } from '#src/components/mark.tsx';
import { PageTitle } from '#src/components/page-title.tsx';
import { sessionQuery } from '#src/lib/session.ts';
import { demoQuery, type Credentials } from '../api.ts';
import { DemoAccounts } from '../components/demo-accounts.tsx';
import { SignInForm } from '../components/sign-in-form.tsx';
import { WhatItIs } from '../components/what-it-is.tsx';

/** Only an address of this application, so that a forged link cannot lead elsewhere after signing in. */
function safeReturn(next: string | null): string {
  if (!next || !URL.canParse(next, window.location.origin)) return '/';
  const target = new URL(next, window.location.origin);
  if (target.origin !== window.location.origin || target.pathname === '/sign-in') return '/';
  return target.pathname + target.search + target.hash;
}

export default function SignInPage() {
  const [search] = useSearchParams();
  const navigate = useNavigate();
  const client = useQueryClient();
  const session = useQuery(sessionQuery);
  const demo = useQuery(demoQuery);
  const [value, setValue] = useState<Credentials>({ email: '', password: '' });
  const form = useRef<HTMLDivElement>(null);
  const next = safeReturn(search.get('next'));

  if (session.data) return <Navigate to={next} replace />;
  return (
    <main className="mx-auto grid min-h-svh max-w-5xl content-center gap-8 px-5 py-10 lg:grid-cols-[1fr_24rem] lg:gap-16">
      <div className="flex flex-col justify-center gap-6">
        <div className="flex items-center gap-3">
          <Mark className="size-11" />
          <span className="font-display text-2xl font-semibold">Tallybarn</span>
        </div>
        <WhatItIs />
      </div>
      <div ref={form} className="flex flex-col gap-6">
        <section className="rounded border border-line bg-sheet p-6">
          <PageTitle title="Sign in" className="mb-4 text-xl!" />
          <SignInForm
            value={value}
            onChange={setValue}
            onSignedIn={() => {
              client.clear();
              void navigate(next, { replace: true });
            }}
          />
        </section>
        {demo.data?.demo && (
          <DemoAccounts
            onChoose={(credentials) => {
              setValue(credentials);
              form.current?.querySelector<HTMLButtonElement>('button[type=submit]')?.focus();
            }}
          />
        )}
      </div>
    </main>
  );
}
