import { spawn } from 'node:child_process';
import type { ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { fileURLToPath } from 'node:url';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { createTestDatabase, query } from '#tests/support/test-database.ts';
import {
  isDone,
  newScan,
  numbers,
  partsOf,
  readScan,
  startScan,
  startWorker,
  waitFor,
} from './scan-requests.ts';

const WORKER = fileURLToPath(new URL('../../../server/worker.ts', import.meta.url));

let app: TestApp;
let agent: Agent;
const running = new Set<ChildProcess>();
beforeAll(async () => {
  app = await createTestApp();
  agent = await app.signedIn('theorist');
});
afterEach(() => {
  for (const child of running) child.kill('SIGKILL');
  running.clear();
});
afterAll(() => app.close());

function startProcess(changes: Record<string, string> = {}) {
  const child = spawn(process.execPath, ['--import', 'tsx', WORKER], {
    env: {
      PATH: process.env['PATH'],
      DATABASE_URL: app.database.runtimeUrl,
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
  const ended = once(child, 'exit').then(([code, signal]) => (code ?? signal) as number | string);
  return { child, ended, output: () => text };
}

test('a worker killed in the middle: another finishes, and every point is there once', async () => {
  const { child, ended } = startProcess();
  // So many that no machine is through with them between the look and the blow.
  const count = 12_000;
  const id = await startScan(agent, newScan(count));
  await waitFor(agent, id, ({ done }) => done >= 1);
  child.kill('SIGKILL');
  expect(await ended).toBe('SIGKILL');
  const { done, status } = await readScan(agent, id);
  expect([status, done < count]).toEqual(['running', true]);
  const worker = startWorker(app);
  try {
    expect(await waitFor(agent, id, isDone)).toMatchObject({ done: count, total: count });
  } finally {
    await worker.stop();
  }
  expect(await partsOf(app, id)).toEqual(numbers(count));
  const taken = await query(
    app.database.ownerUrl,
    'select max(losses) as losses from job_shares where job_id = $1',
    [id],
  );
  expect(taken).toEqual([{ losses: 1 }]);
}, 90_000);

test('SIGTERM and the end of its standard input stop it in order: what it held is free at once', async () => {
  for (const stop of ['SIGTERM', 'stdin'] as const) {
    const { child, ended, output } = startProcess({ STOP_WITH_STDIN: '1' });
    const id = await startScan(agent, newScan(20_000));
    await waitFor(agent, id, ({ done }) => done >= 1);
    if (stop === 'SIGTERM') child.kill('SIGTERM');
    else child.stdin?.end();
    expect(await ended).toBe(0);
    expect(output()).toContain(`"reason":"${stop}"`);
    const left = await query(
      app.database.ownerUrl,
      `select (select count(*)::integer from workers where pid = $1) as workers,
         (select count(*)::integer from job_shares where worker_id is not null) as held`,
      [child.pid],
    );
    expect(left).toEqual([{ workers: 0, held: 0 }]);
    await agent.post(`/api/jobs/${id}/cancel`).expect(200);
  }
}, 90_000);

test('a missing address and a missing schema are said in a line and end it with 1', async () => {
  const empty = await createTestDatabase({ empty: true });
  try {
    for (const [url, words] of [
      ['', /DATABASE_URL is not set/],
      [empty.runtimeUrl, /database lacks m001-ground-floor/],
    ] as const) {
      const { ended, output } = startProcess({ DATABASE_URL: url });
      expect(await ended).toBe(1);
      expect(output()).toMatch(words);
      expect(output()).not.toMatch(/\n\s+at /);
    }
  } finally {
    await empty.drop();
  }
}, 90_000);
