import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { setTimeout as sleep } from 'node:timers/promises';
import { runPlanTrialsSchema, startedTrialsSchema } from '#shared/contracts/run-plan-trials.ts';
import type { RunPlanTrials } from '#shared/contracts/run-plan-trials.ts';
import { jobSchema } from '#shared/contracts/jobs.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { numbers, partsOf, startWorker, watchedCompute } from '../jobs/scan-requests.ts';
import type { RunningWorker } from '../jobs/scan-requests.ts';
import { trialsRequest } from './trials-request.ts';

let app: TestApp;
let agent: Agent;
let worker: RunningWorker | undefined;
beforeAll(async () => {
  app = await createTestApp();
  ({ agent } = await app.person('experimentalist'));
});
afterEach(async () => {
  await worker?.stop();
  worker = undefined;
});
afterAll(() => app.close());

async function start(change: object = {}): Promise<string> {
  const body = { ...trialsRequest, ...change };
  const answer = await agent.post('/api/run-plans/trials').send(body).expect(202);
  return startedTrialsSchema.parse(answer.body).id;
}

async function ended(id: string) {
  for (;;) {
    const job = jobSchema.parse((await agent.get(`/api/jobs/${id}`).expect(200)).body);
    if (!['queued', 'running'].includes(job.state)) return job;
    await sleep(50);
  }
}

async function resultOf(id: string): Promise<RunPlanTrials> {
  const job = await ended(id);
  expect(job).toMatchObject({ state: 'done', kind: 'runPlanTrials', error: null });
  const answer = await agent.get(`/api/run-plans/trials/${id}`).expect(200);
  return runPlanTrialsSchema.parse(answer.body);
}

describe('Monte Carlo of a run plan', () => {
  test('is filed, drawn in parts by a worker and answered beside the budget', async () => {
    const id = await start();
    const early = await agent.get(`/api/run-plans/trials/${id}`).expect(409);
    expect(early.body).toMatchObject({ code: 'conflict', done: 0, total: 3 });
    worker = startWorker(app);
    const found = await resultOf(id);
    expect(found).toMatchObject({ detector: 'D2', trials: 120_000, seed: 11, coverage: 0.95 });
    expectRelative(found.standardDeviation, found.budget.combined, 2e-2);
    expectRelative(found.mean, 1, 3e-3);
    expect(found.histogram.counts.reduce((sum, n) => sum + n, 0)).toBe(120_000);
    const plan = await agent.post('/api/run-plans').send(trialsRequest.plan).expect(200);
    const { detectors } = plan.body as { detectors: { trueRate: { value: number } }[] };
    expectRelative(found.rate.value, detectors[1]?.trueRate.value ?? NaN, 1e-12);
    expect(await partsOf(app, id)).toEqual(numbers(3));
  });

  test('one worker stopped in the middle and another going on give what one worker gives', async () => {
    const seed = 12;
    let asked = 0;
    const slow = watchedCompute(async () => {
      asked += 1;
      if (asked > 1) await sleep(10_000, undefined, { ref: false });
    });
    const id = await start({ seed });
    const first = startWorker(app, slow);
    while ((await partsOf(app, id)).length < 1) await sleep(30);
    const stopped = first.stop();
    worker = startWorker(app);
    const broken = await resultOf(id);
    await stopped;
    const whole = await resultOf(await start({ seed, trials: 120_000, coverage: 0.95 }));
    expect(broken).toEqual(whole);
  }, 60_000);

  test.each([
    [{ detector: 'D9' }, '/plan/detectors', /no detector named D9/],
    [{ trials: 10 }, '/trials', /1,000/],
    [{ seed: -1 }, '/seed', /between 0/],
    [{ plan: { ...trialsRequest.plan, uncertainties: {} } }, '/plan', /uncertainties/],
    [
      { plan: { ...trialsRequest.plan, beam: { current: { value: 1, unit: 'nA' } } } },
      '/plan/beam/chargeState',
      /charge state/,
    ],
  ])('refuses %o', async (change, path, words) => {
    const answer = await agent
      .post('/api/run-plans/trials')
      .send({ ...trialsRequest, ...change })
      .expect(422);
    const { errors } = answer.body as { errors: { path: string; message: string }[] };
    expect(errors.map((error) => error.path)).toContain(path);
    expect(errors.map(({ message }) => message).join(' ')).toMatch(words);
  });
});
