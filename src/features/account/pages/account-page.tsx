import type { ReactNode } from 'react';
import { ROLE_LABELS } from '#shared/roles.ts';
import { Notice } from '#src/components/notice.tsx';
import { PageHead } from '#src/components/page-head.tsx';
import { ThemeSwitch } from '#src/components/theme-switch.tsx';
import { dayOf } from '#src/lib/dates.ts';
import { useSession } from '#src/lib/session.ts';
import { setShortcuts, useShortcutsOn } from '#src/lib/shortcuts.ts';
import { PasswordForm } from '../components/password-form.tsx';
import { Tokens } from '../components/tokens.tsx';

/** One matter of the account: its name on the left, what can be done on the right. */
function Matter({ title, words, children }: { title: string; words: string; children: ReactNode }) {
  const id = `account-${title.toLowerCase().replaceAll(' ', '-')}`;
  return (
    <section
      aria-labelledby={id}
      className="grid gap-x-10 gap-y-3 border-line py-6 not-last:border-b md:grid-cols-[16rem_minmax(0,1fr)]"
    >
      <div>
        <h2 id={id} className="text-lg font-semibold">
          {title}
        </h2>
        <p className="text-sm text-muted">{words}</p>
      </div>
      <div className="min-w-0">{children}</div>
    </section>
  );
}

function Fact({ name, children }: { name: string; children: ReactNode }) {
  return (
    <div>
      <dt className="text-sm text-muted">{name}</dt>
      <dd>{children}</dd>
    </div>
  );
}

export default function AccountPage() {
  const { user } = useSession();
  const shortcuts = useShortcutsOn();
  return (
    <div className="flex max-w-4xl flex-col">
      <PageHead title="Account" />
      <Matter title="You" words="Set by an administrator, who can change it.">
        <dl className="grid grid-cols-[repeat(auto-fit,minmax(12rem,1fr))] gap-x-6 gap-y-3">
          <Fact name="Name">{user.name}</Fact>
          <Fact name="E-mail">{user.email}</Fact>
          <Fact name="Role">{ROLE_LABELS[user.role]}</Fact>
          <Fact name="Since">{dayOf(user.createdAt)}</Fact>
        </dl>
      </Matter>
      <Matter title="Password" words="Changing it ends your other sessions.">
        {user.demo ? (
          <Notice tone="info" title="This is an account of the demo.">
            Its password is known to everyone and cannot be changed.
          </Notice>
        ) : (
          <PasswordForm />
        )}
      </Matter>
      <Matter title="Tokens" words="Keys for scripts that act as you.">
        <Tokens />
      </Matter>
      <Matter title="Appearance" words="Remembered on this computer.">
        <div className="flex flex-col items-start gap-4">
          <ThemeSwitch />
          <label className="flex items-center gap-2">
            <input
              type="checkbox"
              checked={shortcuts}
              onChange={(event) => setShortcuts(event.target.checked)}
              className="size-4 accent-barn"
            />
            Use single keys such as n and /
          </label>
        </div>
      </Matter>
    </div>
  );
}
