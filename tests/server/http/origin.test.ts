import request from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { checkOrigin } from '#server/http/origin.ts';
import { TEST_PASSWORD, makeAccount, makeToken } from '#tests/support/factories.ts';
import { cookieHeader, cookiesOf } from '#tests/support/cookies.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';

let app: TestApp;
let cookie: string;
beforeAll(async () => {
  app = await createTestApp();
  const { email } = await makeAccount(app.em());
  const answer = await request(app.url)
    .post('/api/auth/sign-in')
    .send({ email, password: TEST_PASSWORD })
    .expect(200);
  cookie = cookieHeader(cookiesOf(answer));
});
afterAll(() => app.close());

const newToken = { name: 'A script', scope: 'read', expiresInDays: 1 };
const change = () => request(app.url).post('/api/tokens').set('Cookie', cookie).send(newToken);

test('with a cookie, a change needs an origin that matches', async () => {
  await change().expect(403);
  await change().set('Origin', app.url).expect(201);
  await change().set('Sec-Fetch-Site', 'same-origin').expect(201);
  await change().set('Sec-Fetch-Site', 'none').expect(201);
});

test.each([
  'https://elsewhere.example.org',
  'null',
  'http://127.0.0.1',
  'http://127.0.0.1:1',
  'file://',
  'chrome-extension://abc',
  '',
  'not an origin',
])('the origin %j is refused, whatever else is said', async (origin) => {
  await change().set('Origin', origin).set('Sec-Fetch-Site', 'same-origin').expect(403);
});

test.each(['cross-site', 'same-site', 'unheard-of'])(
  'without an origin, Sec-Fetch-Site %s is refused',
  async (site) => {
    await change().set('Sec-Fetch-Site', site).expect(403);
  },
);

test('another site can neither sign a person in nor read by a cookie that was sent along', async () => {
  const { email } = await makeAccount(app.em());
  await request(app.url)
    .post('/api/auth/sign-in')
    .set('Origin', 'https://elsewhere.example.org')
    .send({ email, password: TEST_PASSWORD })
    .expect(403);
  const read = await request(app.url)
    .get('/api/auth/session')
    .set('Cookie', cookie)
    .set('Origin', 'https://elsewhere.example.org')
    .expect(200);
  expect(read.headers['access-control-allow-origin']).toBeUndefined();
});

test('a script with a token needs no origin', async () => {
  const { secret } = await makeToken(app.em(), { scope: 'write' });
  const answer = await request(app.url)
    .post('/api/users')
    .set('Authorization', `Bearer ${secret}`)
    .send({});
  expect(answer.body).toMatchObject({ code: 'forbidden' });
  expect(JSON.stringify(answer.body)).toContain('role');
});

test('behind a proxy the public address is the one that matches', () => {
  const publicUrl = new URL('https://tallybarn.example.org');
  const host = '10.0.0.1:4780';
  const check = (origin: string) => () =>
    checkOrigin({ origin, host }, { publicUrl, needed: true });
  expect(check('https://tallybarn.example.org')).not.toThrow();
  expect(check('http://tallybarn.example.org')).toThrow(/not accepted/);
  expect(check('https://tallybarn.example.org.elsewhere.example')).toThrow(/not accepted/);
});
