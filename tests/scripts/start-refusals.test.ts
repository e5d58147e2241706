import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { existsSync, mkdirSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { join } from 'node:path';
import process from 'node:process';
import { text } from 'node:stream/consumers';
import { expect, onTestFinished, test } from 'vitest';
import { identify } from '#scripts/lib/identity.mjs';
import { ROOT } from '#scripts/lib/settings.mjs';
import { tempFolder } from './temp-folder.ts';

async function start(env: Record<string, string>) {
  const script = join(ROOT, 'scripts/start.mjs');
  const child = spawn(process.execPath, [script], {
    env: { ...process.env, ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  const closed = once(child, 'close');
  const [out, err] = await Promise.all([text(child.stdout), text(child.stderr)]);
  await closed;
  return { code: child.exitCode, out, err };
}

test('a taken port ends the start at once, by name, before anything is made', async () => {
  const dataDir = join(tempFolder(), 'data');
  const server = createServer().listen(0, '127.0.0.1');
  onTestFinished(() => void server.close());
  await once(server, 'listening');
  const address = server.address();
  const port = typeof address === 'object' && address !== null ? address.port : 0;
  const { code, err, out } = await start({ DATA_DIR: dataDir, PORT: String(port) });
  expect(err).toContain(`Failed: port ${port} on 127.0.0.1 is taken by another program`);
  expect(err).toContain('Mend:');
  expect({ code, out }).toEqual({ code: 1, out: '' });
  expect(existsSync(join(dataDir, 'postgres'))).toBe(false);
  expect(existsSync(join(dataDir, 'start.lock'))).toBe(false);
});

test('a second start on one DATA_DIR is refused and says which process has it', async () => {
  const dataDir = join(tempFolder(), 'data');
  mkdirSync(dataDir);
  writeFileSync(join(dataDir, 'start.lock'), JSON.stringify(identify(process.pid)));
  const { code, err } = await start({ DATA_DIR: dataDir, PORT: '0' });
  expect(err).toContain(`already running on ${dataDir} (process ${process.pid})`);
  expect(code).toBe(1);
});

test('a setting that is not understood is refused by name', async () => {
  const { code, err } = await start({ DATA_DIR: join(tempFolder(), 'data'), PORT: 'http' });
  expect(err).toContain('PORT=http is not a port');
  expect(code).toBe(1);
});

test('a DATA_DIR that is a file, or below one, is refused by name', async () => {
  const file = join(tempFolder(), 'file');
  writeFileSync(file, '');
  for (const dataDir of [file, join(file, 'below')]) {
    const { code, err } = await start({ DATA_DIR: dataDir, PORT: '0' });
    expect(err).toMatch(`the folder ${dataDir} cannot be written to (E`);
    expect(err).toContain('set DATA_DIR');
    expect(code).toBe(1);
  }
});
