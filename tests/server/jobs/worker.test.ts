import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { countWorkers } from '#server/jobs/living-workers.ts';
import { query } from '#tests/support/test-database.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import {
  isDone,
  newScan,
  numbers,
  partsOf,
  readScan,
  startScan,
  startWorker,
  waitFor,
  watchedCompute,
} from './scan-requests.ts';
import type { RunningWorker } from './scan-requests.ts';

let app: TestApp;
let agent: Agent;
const running = new Set<RunningWorker>();
beforeAll(async () => {
  app = await createTestApp();
  agent = await app.signedIn('theorist');
});
afterEach(async () => {
  await Promise.all([...running].map((worker) => worker.stop()));
  running.clear();
});
afterAll(() => app.close());

function work(...args: Parameters<typeof startWorker>): RunningWorker {
  const worker = startWorker(...args);
  running.add(worker);
  return worker;
}

test('two workers share one scan, and each point is computed by one of them', async () => {
  const asked: unknown[][] = [[], []];
  for (const list of asked)
    work(
      app,
      watchedCompute((input) => {
        list.push(input);
        return sleep(5);
      }),
    );
  const id = await startScan(agent, newScan(100));
  await waitFor(agent, id, isDone);
  expect(asked.map((list) => list.length).reduce((a, b) => a + b)).toBe(100);
  expect(Math.min(...asked.map((list) => list.length))).toBeGreaterThan(10);
  expect(await partsOf(app, id)).toEqual(numbers(100));
});

test('a worker that stops keeps what it has; another goes on from there at once', async () => {
  let computed = 0;
  const count = watchedCompute(async () => {
    computed += 1;
    await sleep(10);
  });
  const first = work(app, count);
  const id = await startScan(agent, newScan(120));
  await waitFor(agent, id, ({ done }) => done >= 40);
  await first.stop();
  const { done } = await readScan(agent, id);
  expect(done).toBeLessThan(120);
  const [held] = await query(
    app.database.ownerUrl,
    'select count(*)::integer as held from job_shares where job_id = $1 and worker_id is not null',
    [id],
  );
  expect(held).toEqual({ held: 0 });
  work(app, count);
  await waitFor(agent, id, isDone);
  expect(await partsOf(app, id)).toEqual(numbers(120));
  // At most the share in hand, which has two points here, was begun twice.
  expect(computed).toBeLessThanOrEqual(122);
});

test('cancelling ends what is being computed, and a resumed scan goes on from what it has', async () => {
  const inHand = new Set<unknown>();
  const slow = watchedCompute(() => undefined);
  work(app, async (kind, input, options) => {
    inHand.add(input);
    try {
      await sleep(60_000, undefined, { signal: options?.signal });
      return await slow(kind, input, options);
    } finally {
      inHand.delete(input);
    }
  });
  const id = await startScan(agent, newScan(10));
  await waitFor(agent, id, ({ status }) => status === 'running');
  while (inHand.size === 0) await sleep(20);
  const cancelled = await agent.post(`/api/scans/${id}/cancel`).expect(200);
  expect(cancelled.body).toMatchObject({ status: 'cancelled', done: 0 });
  while (inHand.size > 0) await sleep(20);
  await agent.get(`/api/scans/${id}/result`).expect(409);
  await agent.post(`/api/jobs/${id}/cancel`).expect(200);

  await Promise.all([...running].map((worker) => worker.stop()));
  running.clear();
  work(app);
  await agent.post(`/api/scans/${id}/resume`).expect(200);
  expect(await waitFor(agent, id, isDone)).toMatchObject({ done: 10 });
  await agent.post(`/api/scans/${id}/resume`).expect(409);
  const trail = await query(
    app.database.ownerUrl,
    `select action, actor_name is not null as named from trail where subject_id = $1 order by id`,
    [id],
  );
  expect(trail).toEqual(
    ['job.create', 'job.cancel', 'job.resume'].map((action) => ({ action, named: true })),
  );
});

test('what is a bug ends the job in words, and the worker goes on', async () => {
  let broken = true;
  work(
    app,
    watchedCompute(() => {
      if (broken) throw new TypeError('a secret of the engine');
    }),
  );
  const id = await startScan(agent, newScan(5));
  while ((await readScan(agent, id)).status !== 'failed') await sleep(50);
  const { error } = await readScan(agent, id);
  expect(error).toMatch(/went wrong on our side/);
  expect(error).not.toContain('secret');
  broken = false;
  await agent.post(`/api/scans/${id}/resume`).expect(200);
  expect(await waitFor(agent, id, isDone)).toMatchObject({ done: 5, error: null });
});

test('a long share is handed back between parts when another job waits', async () => {
  const long = await startScan(agent, newScan(640));
  work(
    app,
    watchedCompute(() => sleep(500)),
  );
  await waitFor(agent, long, ({ status }) => status === 'running');
  const short = await startScan(agent, newScan(1));
  await waitFor(agent, short, isDone);
  // Its share has ten parts; the short job did not wait for all of them, and those that were computed are kept.
  const { done } = await readScan(agent, long);
  expect(done).toBeGreaterThan(0);
  expect(done).toBeLessThan(10);
  await agent.post(`/api/jobs/${long}/cancel`).expect(200);
});

test('a share that ends one worker after the other ends its job before it ends them all', async () => {
  const id = await startScan(agent, newScan(1));
  await query(app.database.ownerUrl, 'update job_shares set losses = 5 where job_id = $1', [id]);
  work(app);
  while ((await readScan(agent, id)).status !== 'failed') await sleep(50);
  expect((await readScan(agent, id)).error).toMatch(/5 workers ended or fell silent/);
});

test('workers that live are counted, and those that stop are gone at once', async () => {
  const health = async () =>
    (await agent.get('/api/health').expect(200)).body as { workers: number };
  expect((await health()).workers).toBe(0);
  const worker = work(app);
  while ((await countWorkers(app.em())) === 0) await sleep(20);
  expect((await health()).workers).toBe(1);
  await worker.stop();
  expect((await health()).workers).toBe(0);
});
