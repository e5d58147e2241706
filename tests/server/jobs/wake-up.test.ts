import PgBoss from 'pg-boss';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { PG_BOSS_SCHEMA_24 } from '#server/db/migrations/m004-pg-boss-schema.ts';
import { QUEUE, bossDatabase, openBoss, wakeWorkers } from '#server/jobs/wake-up.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';

let app: TestApp;
let boss: PgBoss;
beforeAll(async () => {
  app = await createTestApp();
  boss = openBoss(bossDatabase(app.em));
  await boss.start();
});
afterAll(async () => {
  await boss.stop({ graceful: false });
  await app.close();
});

const statements = (text: string) => text.replace(/\s+/g, ' ').trim();

test('the frozen schema is the one this version of the package works with', () => {
  expect(statements(PgBoss.getConstructionPlans('pgboss'))).toContain(
    statements(PG_BOSS_SCHEMA_24),
  );
});

test('a wake-up is sent with its transaction, and not without it', async () => {
  const id = crypto.randomUUID();
  await expect(
    app.em().transactional(async (tx) => {
      await wakeWorkers(tx, id, 3);
      throw new Error('rolled back');
    }),
  ).rejects.toThrow('rolled back');
  expect(await boss.fetch(QUEUE)).toEqual([]);

  await app.em().transactional((tx) => wakeWorkers(tx, id, 3));
  const woken = [];
  for (let i = 0; i < 4; i += 1) woken.push(...(await boss.fetch<{ jobId: string }>(QUEUE)));
  expect(woken.map(({ data }) => data)).toEqual([{ jobId: id }, { jobId: id }, { jobId: id }]);
  for (const wakeUp of woken) await boss.deleteJob(QUEUE, wakeUp.id);
  expect(await boss.getQueueSize(QUEUE, { before: 'failed' })).toBe(0);
});

test('a job of a hundred shares wakes no more workers than there can sensibly be', async () => {
  await app.em().transactional((tx) => wakeWorkers(tx, crypto.randomUUID(), 100));
  const woken = await boss.fetch(QUEUE, { batchSize: 50 });
  expect(woken).toHaveLength(8);
  await boss.deleteJob(
    QUEUE,
    woken.map(({ id }) => id),
  );
});

test('the runtime role works in the queue, keeps it tidy, and cannot change what it is', async () => {
  await boss.maintain();
  await expect(boss.createQueue('another')).rejects.toThrow(/permission denied/);
  await expect(boss.deleteQueue(QUEUE)).rejects.toThrow(/permission denied/);
  await expect(boss.clearStorage()).rejects.toThrow(/permission denied/);
});

test('a statement that fails half-way leaves no connection within a dead transaction', async () => {
  const db = bossDatabase(app.em);
  for (let i = 0; i < 12; i += 1) {
    await expect(db.executeSql('BEGIN; select 1; select 1/0; COMMIT;', [])).rejects.toThrow(
      /division by zero/,
    );
  }
  expect(await app.em().execute('select 1 as one')).toEqual([{ one: 1 }]);
});
