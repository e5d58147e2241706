import { ROLE_LABELS, type Role } from '#shared/roles.ts';
import { Button } from '#src/components/button.tsx';
import type { Credentials } from '../api.ts';

const PASSWORD = 'lowmoor-demo';
const ACCOUNTS: ReadonlyArray<{ role: Role; email: string; does: string }> = [
  {
    role: 'experimentalist',
    email: 'experimentalist@lowmoor.example',
    does: 'plans runs, writes cases',
  },
  { role: 'theorist', email: 'theorist@lowmoor.example', does: 'models interactions' },
  { role: 'manager', email: 'manager@lowmoor.example', does: 'reads every case' },
  { role: 'administrator', email: 'admin@lowmoor.example', does: 'keeps the accounts' },
];

/** The demo's accounts, for as long as the server says the demo is on. */
export function DemoAccounts({ onChoose }: { onChoose: (credentials: Credentials) => void }) {
  return (
    <section aria-labelledby="demo-accounts" className="flex flex-col gap-3">
      <div>
        <h2 id="demo-accounts" className="font-semibold">
          Demo accounts
        </h2>
        <p className="text-sm text-muted">
          The demo is on: an invented facility, the Lowmoor Beam Hall. Every account has the
          password <span className="font-mono text-ink">{PASSWORD}</span>.
        </p>
      </div>
      <ul className="grid grid-cols-2 gap-2">
        {ACCOUNTS.map(({ role, email, does }) => (
          <li key={role}>
            <Button
              className="w-full flex-col items-start! gap-0! text-left whitespace-normal!"
              onClick={() => onChoose({ email, password: PASSWORD })}
            >
              <span className="font-semibold">{ROLE_LABELS[role]}</span>
              <span className="text-xs text-muted">{does}</span>
            </Button>
          </li>
        ))}
      </ul>
    </section>
  );
}
