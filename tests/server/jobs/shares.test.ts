import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { createJob } from '#server/jobs/create-job.ts';
import {
  claimShare,
  failJob,
  keepParts,
  keepShare,
  keptParts,
  partValues,
  releaseShare,
} from '#server/jobs/shares.ts';
import type { Part, Share } from '#server/jobs/shares.ts';
import { actorOf } from '#server/modules/users/find-account.ts';
import { makeAccount } from '#tests/support/factories.ts';
import { query } from '#tests/support/test-database.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { energyScan } from './scan-requests.ts';

const [ANNA, BERT] = [
  '11111111-1111-4111-8111-111111111111',
  '22222222-2222-4222-8222-222222222222',
];

let app: TestApp;
beforeAll(async () => {
  app = await createTestApp();
});
beforeEach(() => sql(`update jobs set state = 'cancelled' where state in ('queued', 'running')`));
afterAll(() => app.close());

const sql = (text: string, values: unknown[] = []) => query(app.database.ownerUrl, text, values);

/** A scan of so many points; up to 64 of them are as many shares. */
async function order(points: number): Promise<string> {
  const account = await makeAccount(app.em());
  const actor = actorOf(account, { kind: 'session', sessionId: account.id });
  const axes = [{ ...energyScan.axes[0], count: points }];
  const input = { ...energyScan, axes };
  const context = { em: app.em(), actor, now: new Date() };
  return createJob(context, { kind: 'scan', title: 'A scan', input });
}

async function claim(workerId = ANNA): Promise<Share> {
  const share = await claimShare(app.em(), workerId);
  if (!share) throw new Error('There was no share to take.');
  return share;
}

const part = (n: number, value: unknown = n): Part => ({
  n,
  contentHash: null,
  engine: 'test',
  value,
});
const partsOf = ({ first, end }: Share) =>
  Array.from({ length: end - first }, (_, i) => part(first + i));
const finish = (share: Share) => keepParts(app.em(), share, partsOf(share), { finished: true });
const silence = (id: string) =>
  sql(`update job_shares set heartbeat_at = now() - interval '6 seconds' where job_id = $1`, [id]);

async function stateOf(id: string) {
  const [row] = await sql('select state, done, total, error from jobs where id = $1', [id]);
  return row;
}

describe('taking shares', () => {
  test('each goes to one worker, and none is left over or doubled', async () => {
    const id = await order(3);
    const taken = await Promise.all([1, 2, 3, 4].map(() => claimShare(app.em(), ANNA)));
    const later = await claimShare(app.em(), ANNA);
    const shares = [...taken, later].filter((share) => share !== undefined);
    expect(new Set(shares.map(({ n }) => n)).size).toBe(shares.length);
    expect(shares.map(({ n }) => n).sort()).toEqual([0, 1, 2]);
    expect(await stateOf(id)).toMatchObject({ state: 'running', done: 0, total: 3 });
  });

  test('jobs take turns, so that a long one does not hold up a short one', async () => {
    const long = await order(40);
    const first = await claim();
    const short = await order(1);
    expect([first.jobId, (await claim()).jobId, (await claim()).jobId]).toEqual([
      long,
      short,
      long,
    ]);
  });

  test('a share is wanted when a job waits that had no turn since, and by no other', async () => {
    await order(2);
    const share = await claim(ANNA);
    expect(await keepShare(app.em(), share)).toBe('kept');
    await order(2);
    expect(await keepShare(app.em(), share)).toBe('wanted');
    await claim(BERT);
    expect(await keepShare(app.em(), share)).toBe('kept');
  });

  test('a silent worker’s share goes to the next one at once; a heartbeat keeps it', async () => {
    const id = await order(1);
    const share = await claim(ANNA);
    expect(await claimShare(app.em(), BERT)).toBeUndefined();
    expect(await keepShare(app.em(), share)).toBe('kept');
    await silence(id);
    const again = await claim(BERT);
    expect(again).toMatchObject({ jobId: id, n: 0, attempt: share.attempt + 1, losses: 1 });
  });

  test('a share given back is free at once, and nobody’s loss', async () => {
    await order(1);
    await releaseShare(app.em(), await claim(ANNA));
    expect(await claim(BERT)).toMatchObject({ losses: 0, attempt: 2 });
  });

  test('the share that finishes a job is taken when all others are ended', async () => {
    const id = await order(2);
    await sql('insert into job_shares (job_id, n, first_part, end_part) values ($1, 2, 2, 2)', [
      id,
    ]);
    const [one, two] = [await claim(), await claim()];
    expect(await claimShare(app.em(), BERT)).toBeUndefined();
    await finish(one);
    expect(await claimShare(app.em(), BERT)).toBeUndefined();
    await finish(two);
    expect(await stateOf(id)).toMatchObject({ state: 'running', done: 2 });
    const last = await claim(BERT);
    expect(last).toMatchObject({ n: 2, first: 2, end: 2 });
    const result = { sum: 1 };
    expect(await keepParts(app.em(), last, [], { finished: true, result })).toBe(true);
    expect(await sql('select state, result from jobs where id = $1', [id])).toEqual([
      { state: 'done', result },
    ]);
  });
});

describe('the fence', () => {
  test('a worker thought dead adds, ends and fails nothing', async () => {
    const id = await order(1);
    const late = await claim(ANNA);
    await silence(id);
    const share = await claim(BERT);
    expect(await keepShare(app.em(), late)).toBe('lost');
    expect(await keepParts(app.em(), late, [part(0, 'late')], { finished: true })).toBe(false);
    await failJob(app.em(), late, 'Late.');
    await releaseShare(app.em(), late);
    expect(await stateOf(id)).toMatchObject({ state: 'running', done: 0, error: null });
    expect(await keepShare(app.em(), share)).toBe('kept');
    expect(await keepParts(app.em(), share, [part(0, 'right')], { finished: true })).toBe(true);
    expect(await partValues(app.em(), id)).toEqual(['right']);
    expect(await stateOf(id)).toMatchObject({ state: 'done', done: 1 });
    expect(await finish(share)).toBe(false);
  });

  test('the same worker after a second taking is not the one of the first', async () => {
    const id = await order(1);
    const before = await claim(ANNA);
    await silence(id);
    const after = await claim(ANNA);
    expect(await keepParts(app.em(), before, [part(0)])).toBe(false);
    expect(await keepParts(app.em(), after, [part(0)])).toBe(true);
  });

  test('parts written again after a lost answer are counted once', async () => {
    const id = await order(200);
    const share = await claim();
    const parts = partsOf(share);
    await keepParts(app.em(), share, parts.slice(0, 2));
    await keepParts(app.em(), share, parts.slice(0, 3));
    expect(await keptParts(app.em(), share)).toEqual(new Set([0, 1, 2]));
    expect(await stateOf(id)).toMatchObject({ done: 3 });
  });

  test('of two workers that end the last shares at once, one ends the job', async () => {
    for (let i = 0; i < 8; i += 1) {
      const id = await order(2);
      const [one, two] = [await claim(ANNA), await claim(BERT)];
      expect(await Promise.all([finish(one), finish(two)])).toEqual([true, true]);
      expect(await stateOf(id)).toMatchObject({ state: 'done', done: 2 });
    }
  });

  test('a cancelled job takes nothing more', async () => {
    const id = await order(2);
    const share = await claim();
    await sql(`update jobs set state = 'cancelled' where id = $1`, [id]);
    expect(await keepShare(app.em(), share)).toBe('lost');
    expect(await finish(share)).toBe(false);
    expect(await claimShare(app.em(), BERT)).toBeUndefined();
    expect(await stateOf(id)).toMatchObject({ state: 'cancelled', done: 0 });
  });

  test('numbers that are none never reach the database', async () => {
    await order(1);
    const share = await claim();
    await expect(keepParts(app.em(), share, [part(0, NaN)])).rejects.toThrow(/non-finite/);
    expect(await keptParts(app.em(), share)).toEqual(new Set());
  });
});

test('the runtime role changes no part and removes no job', async () => {
  const id = await order(1);
  await finish(await claim());
  const asRuntime = (text: string) => query(app.database.runtimeUrl, text, [id]);
  for (const text of [
    'update job_parts set engine = engine where job_id = $1',
    'delete from job_parts where job_id = $1',
    'delete from job_shares where job_id = $1',
    'delete from jobs where id = $1',
  ]) {
    await expect(asRuntime(text)).rejects.toThrow(/permission denied/);
  }
});
