import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Worker } from 'node:worker_threads';
import { expect, onTestFinished, test } from 'vitest';
import { workerFile } from '#server/compute/worker-file.ts';

test('a thread of the bundle cannot load an ES module by require(), whose end would abort the process', async () => {
  const folder = mkdtempSync(join(tmpdir(), 'tallybarn-worker-'));
  onTestFinished(() => rmSync(folder, { recursive: true }));
  const module = join(folder, 'module.mjs');
  const thread = join(folder, 'thread.cjs');
  writeFileSync(module, 'export default 1;');
  writeFileSync(
    thread,
    `const { parentPort } = require('node:worker_threads');
     try { require(${JSON.stringify(module)}); parentPort.postMessage('loaded'); }
     catch (error) { parentPort.postMessage(error.code); }`,
  );
  const { execArgv } = workerFile(thread);
  const worker = new Worker(thread, { execArgv });
  const answer: unknown = await new Promise((resolve, reject) => {
    worker.once('message', resolve).once('error', reject);
  });
  expect(answer).toBe('ERR_REQUIRE_ESM');
});
