import { createdTokenSchema } from '#shared/contracts/auth.ts';
import { DEMO_ACCOUNTS, DEMO_PASSWORD } from '#server/db/seeders/demo/scenario.ts';
import type { Role } from '#shared/roles.ts';

/** Signs a demo account in and makes a personal token for a script. */
export async function tokenOf(url: string, role: Role): Promise<string> {
  const headers = { 'content-type': 'application/json', origin: url };
  const email = DEMO_ACCOUNTS.find((account) => account.role === role)?.email;
  const signedIn = await fetch(`${url}/api/auth/sign-in`, {
    method: 'POST',
    headers,
    body: JSON.stringify({ email, password: DEMO_PASSWORD }),
  });
  const cookie = signedIn.headers.getSetCookie().map((line) => line.split(';')[0]);
  const made = await fetch(`${url}/api/tokens`, {
    method: 'POST',
    headers: { ...headers, cookie: cookie.join('; ') },
    body: JSON.stringify({ name: 'Drill', scope: 'write', expiresInDays: 1 }),
  });
  return createdTokenSchema.parse(await made.json()).secret;
}
