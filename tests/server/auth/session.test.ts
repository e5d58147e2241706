import jwt from 'jsonwebtoken';
import request from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { Renewal, Session } from '#server/modules/auth/session.entity.ts';
import { TrailEntry } from '#server/trail/trail-entry.entity.ts';
import { TEST_PASSWORD, makeAccount } from '#tests/support/factories.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { cookiesOf, cookieHeader } from '#tests/support/cookies.ts';

const MINUTE = 60_000;
let app: TestApp;
beforeAll(async () => {
  app = await createTestApp();
});
afterAll(() => app.close());

async function cookiesAfterSignIn() {
  const account = await makeAccount(app.em());
  const answer = await request(app.url)
    .post('/api/auth/sign-in')
    .send({ email: account.email, password: TEST_PASSWORD })
    .expect(200);
  return { account, cookies: cookiesOf(answer), answer };
}

function getSession(cookies: Record<string, string>) {
  return request(app.url).get('/api/auth/session').set('Cookie', cookieHeader(cookies));
}

test('signing in answers the person and sets two cookies no script can read', async () => {
  const { account, answer } = await cookiesAfterSignIn();
  expect(answer.body).toEqual({
    user: {
      id: account.id,
      name: account.name,
      email: account.email,
      role: 'experimentalist',
      active: true,
      demo: false,
      createdAt: account.createdAt.toISOString(),
    },
  });
  const lines = answer.get('Set-Cookie') ?? [];
  expect(lines).toHaveLength(2);
  for (const line of lines) {
    expect(line).toMatch(/; HttpOnly/);
    expect(line).toMatch(/; SameSite=Lax/);
    expect(line).toMatch(/; Path=\//);
    expect(line).not.toMatch(/Secure|Domain/);
  }
});

test('behind https the cookies are Secure and bound to the host', async () => {
  const secure = await createTestApp({
    config: { https: true, publicUrl: new URL('https://tallybarn.example.org') },
  });
  try {
    const account = await makeAccount(secure.em());
    const answer = await request(secure.url)
      .post('/api/auth/sign-in')
      .set('Origin', 'https://tallybarn.example.org')
      .send({ email: account.email, password: TEST_PASSWORD })
      .expect(200);
    const lines = answer.get('Set-Cookie') ?? [];
    for (const line of lines) expect(line).toMatch(/^__Host-tallybarn.*; Secure/);
    expect(lines).toHaveLength(2);
    expect(answer.headers['strict-transport-security']).toMatch(/max-age/);
  } finally {
    await secure.close();
  }
});

test('e-mail addresses are not case-sensitive', async () => {
  const account = await makeAccount(app.em());
  await request(app.url)
    .post('/api/auth/sign-in')
    .send({ email: `  ${account.email.toUpperCase()} `, password: TEST_PASSWORD })
    .expect(200);
});

test('without a session everything guarded is 401', async () => {
  const answer = await request(app.url).get('/api/auth/session').expect(401);
  expect(answer.body).toMatchObject({ code: 'unauthenticated', status: 401 });
  expect(answer.headers['content-type']).toMatch(/^application\/problem\+json/);
});

test.each(['', '0123', '{}', 'a.b.c'])('a cookie that is no token (%j) is 401', async (token) => {
  await getSession({ tallybarn: token }).expect(401);
});

test('a forged, a foreign, an expired and an unsigned token are 401', async () => {
  const { account, cookies } = await cookiesAfterSignIn();
  const { tallybarn = '' } = cookies;
  await getSession({ tallybarn }).expect(200);
  const payload = jwt.decode(tallybarn) as jwt.JwtPayload;
  const sid = payload['sid'] as string;
  const key = app.config.signingKey;
  const refused = {
    otherKey: jwt.sign({ sub: account.id, sid }, 'another key'),
    otherAlgorithm: jwt.sign({ sub: account.id, sid }, key, { algorithm: 'HS512' }),
    none: jwt.sign({ sub: account.id, sid }, '', { algorithm: 'none' }),
    expired: jwt.sign({ sub: account.id, sid }, key, { expiresIn: -1 }),
    otherAccount: jwt.sign({ sub: (await makeAccount(app.em())).id, sid }, key),
    noSession: jwt.sign({ sub: account.id, sid: account.id }, key),
    nothingInside: jwt.sign({}, key),
  };
  for (const [what, forged] of Object.entries(refused)) {
    const answer = await getSession({ tallybarn: forged });
    expect([what, answer.status]).toEqual([what, 401]);
  }
  const [head, , signature] = tallybarn.split('.');
  const body = Buffer.from(JSON.stringify({ ...payload, exp: 9e9 })).toString('base64url');
  await getSession({ tallybarn: `${head}.${body}.${signature}` }).expect(401);
});

test('an expired token is renewed on any request, and the renewal token is replaced', async () => {
  const { cookies } = await cookiesAfterSignIn();
  app.clock.advance(11 * MINUTE);
  const answer = await getSession(cookies).expect(200);
  const fresh = cookiesOf(answer);
  expect(fresh['tallybarn']).not.toBe(cookies['tallybarn']);
  expect(fresh['tallybarn-renewal']).not.toBe(cookies['tallybarn-renewal']);
  const again = await getSession(fresh).expect(200);
  expect(cookiesOf(again)).toEqual({});
});

test('renewal tokens are kept as hashes only', async () => {
  const { cookies } = await cookiesAfterSignIn();
  const stored = await app.em().find(Renewal, {});
  expect(stored.length).toBeGreaterThan(0);
  for (const { tokenHash } of stored) expect(tokenHash).toMatch(/^[0-9a-f]{64}$/);
  expect(JSON.stringify(stored)).not.toContain(cookies['tallybarn-renewal']);
});

test('two tabs may renew at once; each gets a token that works', async () => {
  const { cookies } = await cookiesAfterSignIn();
  app.clock.advance(11 * MINUTE);
  const answers = await Promise.all([1, 2, 3, 4].map(() => getSession(cookies)));
  expect(answers.map(({ status }) => status)).toEqual([200, 200, 200, 200]);
  app.clock.advance(29_000);
  await getSession(cookies).expect(200);
  app.clock.advance(11 * MINUTE);
  for (const answer of answers) await getSession(cookiesOf(answer)).expect(200);
});

test('a renewal token reused later revokes the whole family and is put in the trail', async () => {
  const { account, cookies } = await cookiesAfterSignIn();
  app.clock.advance(11 * MINUTE);
  const fresh = cookiesOf(await getSession(cookies).expect(200));
  app.clock.advance(31_000);
  const stolen = { 'tallybarn-renewal': cookies['tallybarn-renewal'] ?? '' };
  const refused = await getSession(stolen).expect(401);
  expect(cookiesOf(refused)).toEqual({ tallybarn: '', 'tallybarn-renewal': '' });
  await getSession(fresh).expect(401);
  const session = await app.em().findOneOrFail(Session, { accountId: account.id });
  expect(session.endReason).toBe('renewalReused');
  const entries = await app.em().find(TrailEntry, { subjectId: session.id });
  expect(entries.map(({ action }) => action)).toContain('session.renewalReused');
});

test('a session ends after 12 h without use, and use keeps it', async () => {
  const { cookies } = await cookiesAfterSignIn();
  app.clock.advance(11.9 * 60 * MINUTE);
  const kept = cookiesOf(await getSession(cookies).expect(200));
  app.clock.advance(11.9 * 60 * MINUTE);
  const again = cookiesOf(await getSession(kept).expect(200));
  app.clock.advance(12.1 * 60 * MINUTE);
  await getSession(again).expect(401);
});

test('a session ends after 7 days, however much it is used', async () => {
  let { cookies } = await cookiesAfterSignIn();
  for (let hours = 10; hours < 7 * 24; hours += 10) {
    app.clock.advance(600 * MINUTE);
    cookies = cookiesOf(await getSession(cookies).expect(200));
  }
  app.clock.advance(600 * MINUTE);
  await getSession(cookies).expect(401);
});

test('signing out ends the session in the database: a copy of the cookies is worth nothing', async () => {
  const { cookies } = await cookiesAfterSignIn();
  const answer = await request(app.url)
    .post('/api/auth/sign-out')
    .set('Cookie', cookieHeader(cookies))
    .set('Origin', app.url)
    .expect(204);
  expect(cookiesOf(answer)).toEqual({ tallybarn: '', 'tallybarn-renewal': '' });
  await getSession(cookies).expect(401);
  app.clock.advance(11 * MINUTE);
  await getSession(cookies).expect(401);
});

test('a deactivated account has no session, live or new', async () => {
  const { account, cookies } = await cookiesAfterSignIn();
  await app.em().nativeUpdate('Account', { id: account.id }, { active: false });
  await getSession(cookies).expect(401);
  const answer = await request(app.url)
    .post('/api/auth/sign-in')
    .send({ email: account.email, password: TEST_PASSWORD })
    .expect(401);
  expect(answer.body).toMatchObject({ code: 'signInFailed' });
});
