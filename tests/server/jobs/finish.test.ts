import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, afterEach, beforeAll, expect, test, vi } from 'vitest';
import { createJob } from '#server/jobs/create-job.ts';
import { actorOf } from '#server/modules/users/find-account.ts';
import { makeAccount } from '#tests/support/factories.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { query } from '#tests/support/test-database.ts';
import { startWorker } from './scan-requests.ts';
import type { RunningWorker } from './scan-requests.ts';

const finished = vi.hoisted(() => ({ times: 0, fault: undefined as Error | undefined }));

/** Squares, and their sum in the end: a kind whose result is made of all its parts. */
vi.mock('#server/jobs/kinds.ts', async () => {
  const { defineKind } = await import('#server/jobs/job-kind.ts');
  const { z } = await import('zod');
  const scan = defineKind({
    input: z.object({ count: z.int(), broken: z.boolean().optional() }),
    total: ({ count }) => count,
    shareOf: 3,
    open: ({ broken }) => ({
      part: (n) => Promise.resolve(broken && n === 4 ? Infinity : n * n),
    }),
    finish: (_input, parts) => {
      finished.times += 1;
      if (finished.fault) return Promise.reject(finished.fault);
      return Promise.resolve({
        sum: z
          .array(z.number())
          .parse(parts)
          .reduce((a, b) => a + b),
      });
    },
  });
  return { JOB_KINDS: { scan } };
});

let app: TestApp;
let worker: RunningWorker | undefined;
beforeAll(async () => {
  app = await createTestApp();
});
afterEach(async () => {
  await worker?.stop();
  finished.times = 0;
  finished.fault = undefined;
});
afterAll(() => app.close());

async function order(input: object): Promise<string> {
  const account = await makeAccount(app.em());
  const actor = actorOf(account, { kind: 'session', sessionId: account.id });
  const context = { em: app.em(), actor, now: new Date() };
  return createJob(context, { kind: 'scan', title: 'Squares', input });
}

async function ended(id: string) {
  for (;;) {
    const text = 'select state, done, total, result, error from jobs where id = $1';
    const [job] = await query(app.database.ownerUrl, text, [id]);
    if (job && !['queued', 'running'].includes(String(job['state']))) return job;
    await sleep(50);
  }
}

test('what a kind makes of its parts is made once, by one of several workers', async () => {
  const id = await order({ count: 100 });
  const workers = [1, 2, 3].map(() => startWorker(app));
  const sum = Array.from({ length: 100 }, (_, n) => n * n).reduce((a, b) => a + b);
  expect(await ended(id)).toMatchObject({ state: 'done', done: 100, total: 100, result: { sum } });
  await Promise.all(workers.map(({ stop }) => stop()));
  expect(finished.times).toBe(1);
});

test('a fault at the end fails the job in words, and its parts are kept', async () => {
  finished.fault = new TypeError('a secret');
  worker = startWorker(app);
  const job = await ended(await order({ count: 5 }));
  expect(job).toMatchObject({ state: 'failed', done: 5, result: null });
  expect(job['error']).toMatch(/went wrong on our side/);
});

test('a number that is none fails the job and is not kept', async () => {
  worker = startWorker(app);
  const job = await ended(await order({ count: 12, broken: true }));
  expect(job).toMatchObject({ state: 'failed', result: null });
  expect(finished.times).toBe(0);
});
