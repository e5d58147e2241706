import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { createTestDatabase, query } from '#tests/support/test-database.ts';
import type { TestDatabase } from '#tests/support/test-database.ts';

let database: TestDatabase;
beforeAll(async () => {
  database = await createTestDatabase({ empty: true });
});
afterAll(() => database.drop());

async function run(command: string, input: string, changes: Record<string, string> = {}) {
  const file = new URL(`../../../server/commands/${command}.ts`, import.meta.url);
  const child = spawn(process.execPath, ['--import', 'tsx', fileURLToPath(file)], {
    env: {
      PATH: process.env['PATH'],
      DATABASE_URL: database.runtimeUrl,
      MIGRATION_DATABASE_URL: database.ownerUrl,
      ...changes,
    },
  });
  let text = '';
  child.stdout.on('data', (chunk: Buffer) => (text += chunk.toString()));
  child.stderr.on('data', (chunk: Buffer) => (text += chunk.toString()));
  child.stdin.end(input);
  const [status] = (await once(child, 'close')) as [number];
  return { status, text };
}

test('a fresh database is migrated and gets its first administrator by command', async () => {
  const migrated = await run('migrate', '');
  expect(migrated).toMatchObject({ status: 0 });
  expect(migrated.text).toMatch(/Applied to the database: m001-ground-floor/);
  expect((await run('migrate', '')).text).toMatch(/up to date/);

  const weak = await run('admin-create', 'first@example.org\nThe First\nshort\n');
  expect(weak.status).toBe(1);
  expect(weak.text).toMatch(/at least 12 characters/);
  const short = await run('admin-create', 'first@example.org\n');
  expect(short.text).toMatch(/set ADMIN_NAME/);
  expect(await query(database.ownerUrl, 'select 1 from accounts')).toEqual([]);

  const made = await run('admin-create', 'First@example.org\nThe First\n', {
    ADMIN_PASSWORD: 'solid concrete boots',
  });
  expect(made).toEqual({
    status: 0,
    text: 'Made the administrator The First <first@example.org>; sign in with this address.\n',
  });
  expect(await query(database.ownerUrl, 'select email, role, active, demo from accounts')).toEqual([
    { email: 'first@example.org', role: 'administrator', active: true, demo: false },
  ]);
  const trail = await query(database.ownerUrl, 'select actor_name, actor_via, action from trail');
  expect(trail).toEqual([
    { actor_name: 'admin:create', actor_via: 'command', action: 'account.create' },
  ]);
}, 120_000);

test('a database that does not answer is said in a line', async () => {
  const away = 'postgresql://nobody@127.0.0.1:1/nothing';
  const { status, text } = await run('migrate', '', { MIGRATION_DATABASE_URL: away });
  expect(status).toBe(1);
  expect(text).toMatch(/^The database does not answer.*\n$/);
}, 60_000);
