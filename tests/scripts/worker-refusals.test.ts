import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import process from 'node:process';
import { text } from 'node:stream/consumers';
import { expect, test } from 'vitest';
import { ROOT } from '#scripts/lib/settings.mjs';
import { tempFolder } from './temp-folder.ts';

async function work(env: Record<string, string>) {
  const child = spawn(process.execPath, [join(ROOT, 'scripts/worker.mjs')], {
    env: { ...process.env, DATABASE_URL: '', ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  const closed = once(child, 'close');
  const [out, err] = await Promise.all([text(child.stdout), text(child.stderr)]);
  await closed;
  return { code: child.exitCode, out, err };
}

test('a worker without a database to work on says which two ways there are', async () => {
  const dataDir = join(tempFolder(), 'data');
  const { code, err, out } = await work({ DATA_DIR: dataDir });
  expect(err).toContain(`Failed: no Tallybarn is running on ${dataDir}`);
  expect(err).toMatch(/npm start.*DATABASE_URL/);
  expect({ code, out }).toEqual({ code: 1, out: '' });
});

test('an address that is none is refused by name', async () => {
  const { code, err } = await work({ DATA_DIR: tempFolder(), DATABASE_URL: 'localhost' });
  expect(err).toContain('DATABASE_URL is not the address of a PostgreSQL database');
  expect(code).toBe(1);
});
