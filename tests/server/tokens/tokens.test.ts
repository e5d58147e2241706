import request from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { PersonalToken } from '#server/modules/tokens/personal-token.entity.ts';
import { TrailEntry } from '#server/trail/trail-entry.entity.ts';
import { makeToken } from '#tests/support/factories.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';

const DAY = 24 * 3_600_000;
let app: TestApp;
beforeAll(async () => {
  app = await createTestApp();
});
afterAll(() => app.close());

const whoami = (authorization: string) =>
  request(app.url).get('/api/auth/session').set('Authorization', authorization);

test('a token is shown once, works as its owner, and is kept as a hash', async () => {
  const { agent, account } = await app.person('theorist');
  const made = await agent
    .post('/api/tokens')
    .send({ name: 'Nightly', scope: 'write', expiresInDays: 30 })
    .expect(201);
  const { secret, ...token } = made.body as { secret: string; id: string };
  expect(secret).toMatch(/^tbn_[\w-]{43}$/);
  const answer = await whoami(`Bearer ${secret}`).expect(200);
  expect(answer.body).toMatchObject({ user: { id: account.id, role: 'theorist' } });

  const listed = await agent.get('/api/tokens').expect(200);
  expect(listed.body).toMatchObject({ total: 1, items: [{ id: token.id, name: 'Nightly' }] });
  expect(JSON.stringify(listed.body)).not.toMatch(/secret|hash/i);

  const stored = await app.em().findOneOrFail(PersonalToken, { accountId: account.id });
  expect(stored.tokenHash).toMatch(/^[0-9a-f]{64}$/);
  const trail = await app.em().find(TrailEntry, { subjectId: token.id });
  expect(trail.map(({ action }) => action)).toEqual(['token.create']);
  expect(JSON.stringify(trail)).not.toContain(secret);
});

test.each([
  'Bearer',
  'Bearer ',
  'Bearer tbn_unknown',
  'Basic dXNlcjpwYXNzd29yZA==',
  'tbn_unknown',
  'Bearer a b',
  '',
])('the header Authorization: %j is 401, whatever cookie is beside it', async (header) => {
  const agent = await app.signedIn('experimentalist');
  await agent.get('/api/auth/session').expect(200);
  await agent.get('/api/auth/session').set('Authorization', header).expect(401);
});

test('a withdrawn, an expired and a deactivated owner’s token are 401', async () => {
  const { agent, account } = await app.person('experimentalist');
  const { token, secret } = await makeToken(app.em(), { account });
  await whoami(`Bearer ${secret}`).expect(200);
  await agent.delete(`/api/tokens/${token.id}`).expect(204);
  await agent.delete(`/api/tokens/${token.id}`).expect(204);
  await whoami(`Bearer ${secret}`).expect(401);

  const past = new Date(Date.now() - 2 * DAY);
  const expired = await makeToken(app.em(), {
    createdAt: past,
    expiresAt: new Date(past.getTime() + DAY),
  });
  await whoami(`Bearer ${expired.secret}`).expect(401);

  const other = await makeToken(app.em());
  await app.em().nativeUpdate('Account', { id: other.account.id }, { active: false });
  await whoami(`Bearer ${other.secret}`).expect(401);
});

test('a token can neither make nor list nor withdraw tokens', async () => {
  const { token, secret } = await makeToken(app.em(), { scope: 'write' });
  const authorization = `Bearer ${secret}`;
  const target = request(app.url);
  const input = { name: 'More', scope: 'write', expiresInDays: 365 };
  await target.post('/api/tokens').set('Authorization', authorization).send(input).expect(403);
  await target.get('/api/tokens').set('Authorization', authorization).expect(403);
  await target.delete(`/api/tokens/${token.id}`).set('Authorization', authorization).expect(403);
});

test('the time of use is kept, at most once a minute', async () => {
  const { token, secret } = await makeToken(app.em());
  const lastUse = async () =>
    (await app.em().findOneOrFail(PersonalToken, { id: token.id })).lastUsedAt?.getTime() ?? 0;
  await whoami(`Bearer ${secret}`).expect(200);
  const first = await lastUse();
  expect(first).toBeGreaterThan(0);
  app.clock.advance(30_000);
  await whoami(`Bearer ${secret}`).expect(200);
  expect(await lastUse()).toBe(first);
  app.clock.advance(31_000);
  await whoami(`Bearer ${secret}`).expect(200);
  expect(await lastUse()).toBeGreaterThan(first);
});

test.each([
  [{ scope: 'read', expiresInDays: 1 }, '/name'],
  [{ name: ' ', scope: 'read', expiresInDays: 1 }, '/name'],
  [{ name: 'x', scope: 'admin', expiresInDays: 1 }, '/scope'],
  [{ name: 'x', scope: 'read', expiresInDays: 366 }, '/expiresInDays'],
  [{ name: 'x', scope: 'read', expiresInDays: 0 }, '/expiresInDays'],
  [{ name: 'x', scope: 'read', expiresInDays: 1, accountId: 'another' }, '/accountId'],
])('the input %j is refused at %s', async (input, path) => {
  const agent = await app.signedIn('experimentalist');
  const body = (await agent.post('/api/tokens').send(input).expect(422)).body as unknown;
  expect((body as { errors: { path: string }[] }).errors.map((error) => error.path)).toEqual([
    path,
  ]);
});
