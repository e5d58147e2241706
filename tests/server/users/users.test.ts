import request from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { Account } from '#server/modules/users/account.entity.ts';
import { TrailEntry } from '#server/trail/trail-entry.entity.ts';
import { TEST_PASSWORD, makeAccount, makeToken } from '#tests/support/factories.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';

let app: TestApp;
let administrator: Account;
let agent: Agent;
beforeAll(async () => {
  app = await createTestApp();
  ({ account: administrator, agent } = await app.person('administrator'));
});
afterAll(() => app.close());

const input = (email: string) => ({
  name: 'A new person',
  email,
  role: 'theorist',
  password: 'solid concrete boots',
});
const errorPaths = (body: unknown) =>
  (body as { errors?: { path: string }[] }).errors?.map(({ path }) => path);

test('an account made by an administrator can sign in, and stands in the trail', async () => {
  const made = await agent.post('/api/users').send(input(' New@Example.org ')).expect(201);
  expect(made.body).toMatchObject({ email: 'new@example.org', role: 'theorist', active: true });
  expect(JSON.stringify(made.body)).not.toMatch(/password|hash/i);
  await request(app.url)
    .post('/api/auth/sign-in')
    .send({ email: 'new@example.org', password: 'solid concrete boots' })
    .expect(200);
  const { id } = made.body as { id: string };
  const [entry] = await app.em().find(TrailEntry, { subjectId: id });
  expect(entry).toMatchObject({
    action: 'account.create',
    actorId: administrator.id,
    actorVia: 'session',
    before: null,
    after: { email: 'new@example.org', role: 'theorist' },
  });
  expect(JSON.stringify(entry)).not.toMatch(/concrete|\$2/);
});

test('an address is taken once, in any case, also by two at once', async () => {
  await agent.post('/api/users').send(input('once@example.org')).expect(201);
  const again = await agent.post('/api/users').send(input('ONCE@example.org')).expect(409);
  expect(again.body).toMatchObject({ code: 'conflict' });
  expect(errorPaths(again.body)).toEqual(['/email']);
  const race = await Promise.all(
    [1, 2, 3].map(() => agent.post('/api/users').send(input('race@example.org'))),
  );
  expect(race.map(({ status }) => status).sort()).toEqual([201, 409, 409]);
});

test.each([
  [{ password: 'short' }, '/password'],
  [{ password: 'aaaaaaaaaaaaaaaa' }, '/password'],
  [{ password: 'lowmoor-demo' }, '/password'],
  [{ password: 'wilhelmina.tell-1' }, '/password'],
  [{ email: 'no address' }, '/email'],
  [{ role: 'owner' }, '/role'],
  [{ name: '' }, '/name'],
  [{ demo: true }, '/demo'],
])('an account with %j is refused', async (changes, path) => {
  const body = { ...input('wilhelmina.tell@example.org'), ...changes };
  const answer = await agent.post('/api/users').send(body).expect(422);
  expect(errorPaths(answer.body)).toEqual([path]);
});

test('the list is paged and searched, with signs taken as they are', async () => {
  await makeAccount(app.em(), { name: '100% certain' });
  await makeAccount(app.em(), { name: '1000 certain' });
  const found = await agent.get('/api/users').query({ q: '100%' }).expect(200);
  expect(found.body).toMatchObject({ total: 1, items: [{ name: '100% certain' }] });
  const first = await agent.get('/api/users?page=1&pageSize=2').expect(200);
  const second = await agent.get('/api/users?page=2&pageSize=2').expect(200);
  const ids = [first, second].flatMap(({ body }) =>
    (body as { items: { id: string }[] }).items.map(({ id }) => id),
  );
  expect(new Set(ids).size).toBe(4);
  await agent.get('/api/users?pageSize=1000').expect(422);
});

test('deactivating ends sessions and tokens; the trail tells what was before and after', async () => {
  const { account, agent: theirs } = await app.person('experimentalist');
  const { secret } = await makeToken(app.em(), { account });
  await agent.patch(`/api/users/${account.id}`).send({ active: false }).expect(200);
  await theirs.get('/api/auth/session').expect(401);
  await request(app.url)
    .get('/api/auth/session')
    .set('Authorization', `Bearer ${secret}`)
    .expect(401);
  const [entry] = await app.em().find(TrailEntry, { subjectId: account.id });
  expect(entry).toMatchObject({ before: { active: true }, after: { active: false } });
  await agent.patch(`/api/users/${account.id}`).send({ active: true }).expect(200);
  await theirs.get('/api/auth/session').expect(401);
});

test('a password set by an administrator ends the sessions and forgives the failures', async () => {
  const { account, agent: theirs } = await app.person('manager');
  const signIn = (password: string) =>
    request(app.url).post('/api/auth/sign-in').send({ email: account.email, password });
  for (let i = 0; i < 10; i += 1) await signIn('guess').expect(401);
  await signIn(TEST_PASSWORD).expect(429);
  await agent
    .patch(`/api/users/${account.id}`)
    .send({ password: 'solid concrete boots' })
    .expect(200);
  await theirs.get('/api/auth/session').expect(401);
  await signIn('solid concrete boots').expect(200);
  const entries = await app.em().find(TrailEntry, { subjectId: account.id });
  expect(JSON.stringify(entries)).toContain('passwordChanged');
  expect(JSON.stringify(entries)).not.toMatch(/concrete|\$2/);
});

test('the last active administrator can be neither demoted nor deactivated', async () => {
  const alone = await createTestApp();
  try {
    const { account, agent: only } = await alone.person('administrator');
    await makeAccount(alone.em(), { role: 'administrator', active: false });
    const patch = (body: object) => only.patch(`/api/users/${account.id}`).send(body);
    expect((await patch({ role: 'theorist' }).expect(409)).body).toMatchObject({
      code: 'conflict',
    });
    await patch({ active: false }).expect(409);
    await patch({ name: 'Still here' }).expect(200);
    const kept = await alone.em().findOneOrFail(Account, { id: account.id });
    expect(kept).toMatchObject({ role: 'administrator', active: true, name: 'Still here' });
  } finally {
    await alone.close();
  }
});

test('two administrators who demote each other at once do not both succeed', async () => {
  const two = await createTestApp();
  try {
    const first = await two.person('administrator');
    const second = await two.person('administrator');
    const answers = await Promise.all([
      first.agent.patch(`/api/users/${second.account.id}`).send({ role: 'theorist' }),
      second.agent.patch(`/api/users/${first.account.id}`).send({ role: 'theorist' }),
    ]);
    const left = await two.em().count(Account, { role: 'administrator', active: true });
    expect(left).toBeGreaterThanOrEqual(1);
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1);
  } finally {
    await two.close();
  }
});

test('an account that is not there is 404', async () => {
  await agent
    .patch('/api/users/00000000-0000-4000-8000-000000000000')
    .send({ name: 'Nobody' })
    .expect(404);
  await agent.patch('/api/users/17').send({ name: 'Nobody' }).expect(404);
});
