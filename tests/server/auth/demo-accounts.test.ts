import request from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { demoAccountsUsable } from '#server/modules/auth/demo-gate.ts';
import { parseConfig } from '#server/config.ts';
import { TEST_PASSWORD, makeAccount, makeToken } from '#tests/support/factories.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';

const FORWARDED = [
  ['Forwarded', 'for=192.0.2.1'],
  ['X-Forwarded-For', '127.0.0.1'],
  ['X-Forwarded-Proto', 'https'],
  ['X-Forwarded-Host', 'tallybarn.example.org'],
  ['X-Forwarded-Anything', ''],
  ['X-Real-IP', '127.0.0.1'],
  ['Via', '1.1 proxy'],
] as const;

let app: TestApp;
beforeAll(async () => {
  app = await createTestApp();
});
afterAll(() => app.close());

function signIn(target: TestApp, email: string) {
  return request(target.url).post('/api/auth/sign-in').send({ email, password: TEST_PASSWORD });
}

test('a demo account signs in on the machine itself', async () => {
  const { email } = await makeAccount(app.em(), { demo: true });
  const answer = await signIn(app, email).expect(200);
  expect(answer.body).toMatchObject({ user: { demo: true } });
});

test.each(FORWARDED)(
  'a demo account is locked where the header %s is there',
  async (name, value) => {
    const account = await makeAccount(app.em(), { demo: true });
    const refused = await signIn(app, account.email).set(name, value).expect(401);
    expect((refused.body as { detail: string }).detail).toMatch(/without a proxy/);

    const agent = await app.signedIn(account);
    await agent.get('/api/auth/session').expect(200);
    await agent.get('/api/auth/session').set(name, value).expect(401);

    const { secret } = await makeToken(app.em(), { account });
    const byToken = () =>
      request(app.url).get('/api/auth/session').set('Authorization', `Bearer ${secret}`);
    await byToken().expect(200);
    await byToken().set(name, value).expect(401);
  },
);

test('the sign-in page hears of the demo only where its accounts work', async () => {
  const here = await request(app.url).get('/api/health');
  const throughProxy = await request(app.url)
    .get('/api/health')
    .set('x-forwarded-for', '192.0.2.1');
  expect([here.body, throughProxy.body]).toMatchObject([{ demo: true }, { demo: false }]);
});

test('a demo account is locked under a name that was made to point here', async () => {
  const { email } = await makeAccount(app.em(), { demo: true });
  const host = `rebound.example.org:${new URL(app.url).port}`;
  await signIn(app, email).set('Host', host).set('Origin', `http://${host}`).expect(401);
});

test('every other account may come through a proxy', async () => {
  const { email } = await makeAccount(app.em());
  for (const [name, value] of FORWARDED) await signIn(app, email).set(name, value).expect(200);
});

test('demo accounts, their sessions and tokens end with the demo', async () => {
  const closed = await createTestApp({ config: { demo: false, demoAccountsOpen: false } });
  try {
    const account = await makeAccount(closed.em(), { demo: true });
    await signIn(closed, account.email).expect(401);
    const { secret } = await makeToken(closed.em(), { account });
    await request(closed.url)
      .get('/api/auth/session')
      .set('Authorization', `Bearer ${secret}`)
      .expect(401);
  } finally {
    await closed.close();
  }
});

test.each([
  [{}, true, true],
  [{ HOST: '127.0.0.1' }, true, true],
  [{ HOST: '::1' }, true, true],
  [{ HOST: 'localhost' }, true, true],
  [{ HOST: '0.0.0.0' }, false, false],
  [{ HOST: '0.0.0.0', DEMO: '1' }, true, false],
  [{ HOST: '192.0.2.1', DEMO: '1' }, true, false],
  [{ HOST: '127.0.0.1.example.org', DEMO: '1' }, true, false],
  [{ DEMO: '0' }, false, false],
])('with %j the demo is %s and its accounts are open: %s', (env, demo, open) => {
  const config = parseConfig(env);
  expect([config.demo, config.demoAccountsOpen]).toEqual([demo, open]);
  expect(demoAccountsUsable(config, { host: 'localhost:4780' })).toBe(open);
});
