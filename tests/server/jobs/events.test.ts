import { get } from 'node:http';
import type { IncomingMessage } from 'node:http';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { jobProgressSchema } from '#shared/contracts/jobs.ts';
import type { JobProgress } from '#shared/contracts/jobs.ts';
import { endStreams } from '#server/http/event-stream.ts';
import { makeToken } from '#tests/support/factories.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { newScan, startScan, startWorker, watchedCompute } from './scan-requests.ts';
import { makeJob } from './make-job.ts';

let app: TestApp;
let agent: Agent;
let secret: string;
beforeAll(async () => {
  app = await createTestApp();
  const made = await makeToken(app.em(), { scope: 'write' });
  secret = made.secret;
  agent = app.anonymous().set('Authorization', `Bearer ${secret}`);
});
afterAll(() => app.close());

function open(id: string, headers: Record<string, string> = {}): Promise<IncomingMessage> {
  return new Promise((resolve, reject) => {
    const url = `${app.url}/api/jobs/${id}/events`;
    get(url, { headers: { authorization: `Bearer ${secret}`, ...headers } }, resolve).on(
      'error',
      reject,
    );
  });
}

interface Heard {
  id: string;
  progress: JobProgress;
}

/** Events of a stream as they come; ends with it. */
async function* listen(answer: IncomingMessage): AsyncGenerator<Heard> {
  let text = '';
  answer.setEncoding('utf8');
  for await (const chunk of answer) {
    text += String(chunk);
    for (let end = text.indexOf('\n\n'); end >= 0; end = text.indexOf('\n\n')) {
      const block = text.slice(0, end);
      text = text.slice(end + 2);
      const fields = new Map(
        block.split('\n').map((line) => line.split(/: (.*)/, 2) as [string, string]),
      );
      if (fields.get('event') !== 'progress') continue;
      const progress = jobProgressSchema.parse(JSON.parse(fields.get('data') ?? ''));
      yield { id: fields.get('id') ?? '', progress };
    }
  }
}

test('a stream tells the state now, the progress, and the end, and then ends itself', async () => {
  const id = await startScan(agent, newScan(30));
  const answer = await open(id);
  expect(answer.statusCode).toBe(200);
  expect(answer.headers['content-type']).toBe('text/event-stream; charset=utf-8');
  expect(answer.headers['cache-control']).toContain('no-transform');
  const heard: Heard[] = [];
  let worker: ReturnType<typeof startWorker> | undefined;
  try {
    for await (const event of listen(answer)) {
      heard.push(event);
      worker ??= startWorker(
        app,
        watchedCompute(() => new Promise((resolve) => setTimeout(resolve, 100))),
      );
    }
  } finally {
    await worker?.stop();
  }
  const states = heard.map(({ progress }) => progress.state);
  expect([states[0], states.at(-1)]).toEqual(['queued', 'done']);
  expect(states).toContain('running');
  expect(heard[0]?.progress).toMatchObject({
    id,
    done: 0,
    total: 30,
    secondsLeft: null,
    workers: 0,
  });
  const done = heard.map(({ progress }) => progress.done);
  expect([...done].sort((a, b) => a - b)).toEqual(done);
  const under = heard.find(({ progress }) => progress.done > 0 && progress.done < 30)?.progress;
  expect(under?.secondsLeft).toBeGreaterThan(0);
  expect(under?.workers).toBe(1);

  // A browser that comes again after the end is told to stop; one that lost the line before hears the truth first.
  expect((await open(id, { 'last-event-id': heard.at(-1)?.id ?? '' })).statusCode).toBe(204);
  const again = await open(id, { 'last-event-id': heard[1]?.id ?? '' });
  const rest: Heard[] = [];
  for await (const event of listen(again)) rest.push(event);
  expect(rest.map(({ progress }) => [progress.state, progress.done])).toEqual([['done', 30]]);
});

test('a person who watches too many is told to close one', async () => {
  const { account, secret: own } = await makeToken(app.em());
  const job = await makeJob(app.em(), { ownerId: account.id, state: 'queued' });
  const headers = { authorization: `Bearer ${own}` };
  const answers = [];
  for (let i = 0; i < 17; i += 1) answers.push(await open(job.id, headers));
  expect(answers.map(({ statusCode }) => statusCode)).toEqual([
    ...Array.from({ length: 16 }, () => 200),
    429,
  ]);
  for (const answer of answers) answer.destroy();
});

test('a server that stops ends its streams', async () => {
  const { account } = await makeToken(app.em());
  const waiting = await makeJob(app.em(), { ownerId: account.id, state: 'queued' });
  const { secret: reading } = await makeToken(app.em(), { account, scope: 'read' });
  const answer = await open(waiting.id, { authorization: `Bearer ${reading}` });
  const events = listen(answer);
  expect((await events.next()).value).toMatchObject({ progress: { state: 'queued' } });
  endStreams();
  expect((await events.next()).done).toBe(true);
});

test('only those who may read a job hear of it', async () => {
  const { account } = await makeToken(app.em());
  const job = await makeJob(app.em(), { ownerId: account.id });
  expect((await open(job.id)).statusCode).toBe(404);
  expect((await open(job.id, { authorization: 'Bearer tbn_nobody' })).statusCode).toBe(401);
});
