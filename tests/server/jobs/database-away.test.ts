import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { openOrm } from '#server/db/orm.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { wireToDatabase } from '#tests/support/wire.ts';
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
beforeAll(async () => {
  app = await createTestApp();
  agent = await app.signedIn('theorist');
});
afterAll(() => app.close());

test('a database that goes away in the middle is waited for, and every point is there once', async () => {
  const wire = await wireToDatabase();
  const orm = await openOrm({ databaseUrl: wire.through(app.database.runtimeUrl), poolSize: 4 });
  let worker: RunningWorker | undefined;
  try {
    worker = startWorker(
      { orm },
      watchedCompute(() => sleep(5)),
    );
    const id = await startScan(agent, newScan(200));
    await waitFor(agent, id, ({ done }) => done >= 30);
    wire.cut();
    await sleep(1_500);
    const { done } = await readScan(agent, id);
    expect(done).toBeLessThan(200);
    wire.mend();
    expect(await waitFor(agent, id, isDone)).toMatchObject({ done: 200, total: 200 });
    expect(await partsOf(app, id)).toEqual(numbers(200));
  } finally {
    await worker?.stop();
    await orm.close(true);
    wire.close();
  }
});
