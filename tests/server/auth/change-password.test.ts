import { afterAll, beforeAll, expect, test } from 'vitest';
import { TEST_PASSWORD, makeAccount, makeToken } from '#tests/support/factories.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';

const NEW_PASSWORD = 'quite another password';
let app: TestApp;
beforeAll(async () => {
  app = await createTestApp();
});
afterAll(() => app.close());

function change(agent: Awaited<ReturnType<TestApp['signedIn']>>, newPassword: string) {
  const currentPassword = TEST_PASSWORD;
  return agent.post('/api/auth/password').send({ currentPassword, newPassword });
}

test('a new password ends every other session and keeps this one', async () => {
  const account = await makeAccount(app.em());
  const here = await app.signedIn(account);
  const elsewhere = await app.signedIn(account);
  await change(here, NEW_PASSWORD).expect(204);
  await here.get('/api/auth/session').expect(200);
  await elsewhere.get('/api/auth/session').expect(401);
  const sign = (password: string) =>
    app.anonymous().post('/api/auth/sign-in').send({ email: account.email, password });
  await sign(TEST_PASSWORD).expect(401);
  await sign(NEW_PASSWORD).expect(200);
});

test('the current password must be right, and guessing it is throttled', async () => {
  const agent = await app.signedIn('theorist');
  const guess = (currentPassword: string) =>
    agent.post('/api/auth/password').send({ currentPassword, newPassword: NEW_PASSWORD });
  for (let i = 0; i < 10; i += 1) {
    const answer = await guess(`guess ${i}`).expect(422);
    expect(answer.body).toMatchObject({ errors: [{ path: '/currentPassword' }] });
  }
  await guess(TEST_PASSWORD).expect(429);
});

test.each([
  ['eleven char', /at least 12/],
  ['x'.repeat(73), /72 bytes/],
  ['é'.repeat(37), /72 bytes/],
  ['a password\u0000 with NUL', /NUL/],
])('the weak or unfit password %j is refused', async (password, words) => {
  const answer = await change(await app.signedIn('experimentalist'), password).expect(422);
  const { errors } = answer.body as { errors: { path: string; message: string }[] };
  expect(errors[0]?.path).toBe('/newPassword');
  expect(errors[0]?.message).toMatch(words);
});

test('72 bytes are a password', async () => {
  await change(await app.signedIn('experimentalist'), `${'éàüöß'.repeat(7)}é`).expect(204);
});

test('the demo accounts keep their password, and a token cannot change one', async () => {
  const demo = await makeAccount(app.em(), { demo: true });
  await change(await app.signedIn(demo), NEW_PASSWORD).expect(403);
  const { secret } = await makeToken(app.em());
  await app
    .anonymous()
    .post('/api/auth/password')
    .set('Authorization', `Bearer ${secret}`)
    .send({ currentPassword: TEST_PASSWORD, newPassword: NEW_PASSWORD })
    .expect(403);
});
