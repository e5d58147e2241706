import { spawn } from 'node:child_process';
import type { ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { openOrm } from '#server/db/orm.ts';
import { makeToken } from '#tests/support/factories.ts';
import { createTestDatabase } from '#tests/support/test-database.ts';
import type { TestDatabase } from '#tests/support/test-database.ts';
import { makeJob } from '../jobs/make-job.ts';

const MAIN = fileURLToPath(new URL('../../../server/main.ts', import.meta.url));
let database: TestDatabase;
let secretsFile: string;
const running = new Set<ChildProcess>();

beforeAll(async () => {
  database = await createTestDatabase();
  const folder = mkdtempSync(join(tmpdir(), 'main-'));
  secretsFile = join(folder, 'secrets.json');
  writeFileSync(secretsFile, JSON.stringify({ signingKey: 'x'.repeat(40) }));
});
afterEach(() => {
  for (const child of running) child.kill('SIGKILL');
  running.clear();
});
afterAll(() => database.drop());

interface Started {
  child: ChildProcess;
  output: () => string;
  ended: Promise<number | null>;
  port: () => Promise<number>;
}

function start(changes: Record<string, string>): Started {
  const child = spawn(process.execPath, ['--import', 'tsx', MAIN], {
    env: {
      PATH: process.env['PATH'],
      DATABASE_URL: database.runtimeUrl,
      SECRETS_FILE: secretsFile,
      PORT: '0',
      LOG_LEVEL: 'info',
      ...changes,
    },
    stdio: ['pipe', 'pipe', 'pipe'],
  });
  running.add(child);
  let text = '';
  const read = (chunk: Buffer) => (text += chunk.toString());
  child.stdout.on('data', read);
  child.stderr.on('data', read);
  const ended = once(child, 'exit').then(([code]) => code as number | null);
  const port = async () => {
    for (let found; ; await new Promise((resolve) => setTimeout(resolve, 50))) {
      found = /"port":(\d+).*"listening"/.exec(text)?.[1];
      if (found) return Number(found);
      if (child.exitCode !== null) throw new Error(`The server ended: ${text}`);
    }
  };
  return { child, output: () => text, ended, port };
}

test('SIGTERM stops it in order: requests under way finish, then status 0', async () => {
  const { child, ended, port, output } = start({});
  const url = `http://127.0.0.1:${await port()}`;
  expect((await fetch(`${url}/api/health`)).status).toBe(200);
  const signIn = fetch(`${url}/api/auth/sign-in`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify({ email: 'nobody@example.org', password: 'a wrong one' }),
  });
  await new Promise((resolve) => setTimeout(resolve, 100));
  child.kill('SIGTERM');
  expect((await signIn).status).toBe(401);
  expect(await ended).toBe(0);
  expect(output()).toContain('SIGTERM');
}, 90_000);

test('SIGTERM ends streams of events as the stream itself would, and waits for none', async () => {
  const orm = await openOrm({ databaseUrl: database.runtimeUrl, poolSize: 1 });
  const { secret, account } = await makeToken(orm.em.fork());
  const job = await makeJob(orm.em.fork(), { ownerId: account.id, state: 'queued' });
  await orm.close(true);
  const { child, ended, port } = start({});
  const url = `http://127.0.0.1:${await port()}/api/jobs/${job.id}/events`;
  const answer = await fetch(url, { headers: { Authorization: `Bearer ${secret}` } });
  expect(answer.status).toBe(200);
  child.kill('SIGTERM');
  // A connection that was cut would reject here.
  expect(await answer.text()).toContain('event: progress');
  expect(await ended).toBe(0);
}, 90_000);

test('it ends when its standard input does, as whoever started it is gone then', async () => {
  const { child, ended, port } = start({ STOP_WITH_STDIN: '1' });
  await port();
  child.stdin?.end();
  expect(await ended).toBe(0);
}, 90_000);

test('a taken port, a wrong variable and a missing schema are said in a line and end it with 1', async () => {
  const taken = createServer().listen(0, '127.0.0.1');
  await once(taken, 'listening');
  const { port } = taken.address() as AddressInfo;
  const empty = await createTestDatabase({ empty: true });
  try {
    const cases = [
      [{ PORT: String(port) }, new RegExp(`PORT ${port} on 127.0.0.1 is taken`)],
      [{ PORT: 'http' }, /PORT is not usable/],
      [{ DATABASE_URL: '' }, /DATABASE_URL is not set/],
      [{ SECRETS_FILE: '/nowhere/secrets.json' }, /SECRETS_FILE .* cannot be read/],
      [{ DATABASE_URL: empty.runtimeUrl }, /database lacks m001-ground-floor/],
    ] as const;
    for (const [changes, words] of cases) {
      const { ended, output } = start(changes);
      expect(await ended).toBe(1);
      expect(output()).toMatch(words);
      expect(output()).not.toMatch(/\n\s+at /);
    }
  } finally {
    taken.close();
    await empty.drop();
  }
}, 90_000);
