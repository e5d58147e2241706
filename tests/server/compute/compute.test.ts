import { fileURLToPath } from 'node:url';
import { afterAll, afterEach, describe, expect, test } from 'vitest';
import { createCompute } from '#server/compute/compute.ts';
import type { ComputeOptions, ComputePool } from '#server/compute/compute.ts';
import { workerFile } from '#server/compute/worker-file.ts';
import { estimateRequestSchema } from '#shared/contracts/estimates.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { CONTRACT_BODY, born1 } from '#tests/physics/observables/bodies.ts';

const SLOW = workerFile(fileURLToPath(new URL('./slow-worker.ts', import.meta.url)));
const pools: ComputePool[] = [];

function slowPool(options: { threads?: number; capacity?: number } = {}) {
  const pool = createCompute({ threads: 1, worker: SLOW, ...options });
  pools.push(pool);
  // The slow worker takes wishes in place of bodies.
  const ask = pool.compute as (k: 'estimate', i: object, o?: ComputeOptions) => Promise<unknown>;
  return { pool, ask: (wish: object, more?: ComputeOptions) => ask('estimate', wish, more) };
}

afterEach(async () => {
  await Promise.all(pools.splice(0).map((pool) => pool.close()));
});

describe('the engine behind its door', () => {
  const pool = createCompute({ threads: 1 });
  afterAll(() => pool.close());
  const body = estimateRequestSchema.parse(CONTRACT_BODY);

  test('answers the body of the contract from a thread', async () => {
    const estimate = await pool.compute('estimate', body);
    expectRelative(born1(estimate).differential[0]?.dcs ?? NaN, 6.888967358, 1e-10);
  });

  test('hands on a refusal with its pointers', async () => {
    const wrong = { ...body, interaction: { terms: [{ form: 'yukava' }] } };
    await expect(pool.compute('estimate', wrong)).rejects.toMatchObject({
      name: 'DomainError',
      code: 'invalidInput',
      details: { errors: [{ path: '/interaction/terms/0/form' }] },
    });
  });
});

test('past its deadline a thread is ended, the caller told, and the next task served', async () => {
  const { ask } = slowPool();
  await ask({ echo: 1 });
  await expect(ask({ spin: 60_000 }, { deadline: 200 })).rejects.toMatchObject({
    code: 'tooMuchWork',
    message: expect.stringMatching(/stopped after 0.2 s/) as unknown,
  });
  expect(await ask({ echo: 'still here' })).toBe('still here');
});

test('the event loop runs on while a thread spins', async () => {
  const { ask } = slowPool();
  let beats = 0;
  const heart = setInterval(() => (beats += 1), 10);
  await ask({ spin: 400, echo: 0 });
  clearInterval(heart);
  expect(beats).toBeGreaterThan(1);
});

test('a caller who gives up hears of it at once, and the thread is freed', async () => {
  const { ask } = slowPool();
  await ask({ echo: 1 });
  const leaving = new AbortController();
  const given = ask({ spin: 60_000 }, { signal: leaving.signal });
  setTimeout(() => leaving.abort(), 100);
  await expect(given).rejects.toMatchObject({ code: 'tooMuchWork' });
  expect(await ask({ echo: 'freed' })).toBe('freed');
});

test('a signal that is aborted already asks nothing', async () => {
  const { ask } = slowPool();
  await expect(ask({ echo: 1 }, { signal: AbortSignal.abort() })).rejects.toMatchObject({
    code: 'tooMuchWork',
  });
});

test('a thread that dies is replaced', async () => {
  const { ask } = slowPool();
  await expect(ask({ die: true })).rejects.toThrow(/exit/);
  expect(await ask({ echo: 'replaced' })).toBe('replaced');
});

test('a bug is no refusal', async () => {
  const { ask } = slowPool();
  await expect(ask({ bug: true })).rejects.toMatchObject({ message: 'a bug in the engine' });
  await expect(ask({ bug: true })).rejects.not.toHaveProperty('code');
});

test('beyond its capacity the pool refuses rather than gather work', async () => {
  const { ask } = slowPool({ capacity: 2 });
  const waiting = [ask({ spin: 200, echo: 1 }), ask({ echo: 2 })];
  await expect(ask({ echo: 3 })).rejects.toMatchObject({ code: 'unavailable' });
  expect(await Promise.all(waiting)).toEqual([1, 2]);
  expect(await ask({ echo: 4 })).toBe(4);
});

test('closing refuses what runs and what comes', async () => {
  const { pool, ask } = slowPool();
  const running = ask({ spin: 60_000 });
  const refused = expect(running).rejects.toMatchObject({ code: 'unavailable' });
  await new Promise((resolve) => setTimeout(resolve, 100));
  await pool.close();
  await refused;
  await expect(ask({ echo: 1 })).rejects.toMatchObject({ code: 'unavailable' });
});
