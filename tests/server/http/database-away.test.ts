import request from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { TEST_PASSWORD, makeAccount } from '#tests/support/factories.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { wireToDatabase } from '#tests/support/wire.ts';
import type { Wire } from '#tests/support/wire.ts';

let app: TestApp;
let wire: Wire;
beforeAll(async () => {
  wire = await wireToDatabase();
  app = await createTestApp({ databaseUrl: wire.through });
});
afterAll(async () => {
  await app.close();
  wire.close();
});

test('while the database is away every answer says so, and all recovers by itself', async () => {
  const { email } = await makeAccount(app.em());
  const agent = await app.signedIn('administrator');
  const health = () => request(app.url).get('/api/health');
  expect((await health().expect(200)).body).toMatchObject({ status: 'ok', database: 'ok' });

  wire.cut();
  const down = await health().expect(503);
  expect(down.body).toMatchObject({ code: 'unavailable', database: 'unreachable' });
  expect(down.headers['retry-after']).toBe('5');
  const refused = await agent.get('/api/users').expect(503);
  expect(refused.headers['content-type']).toMatch(/problem\+json/);
  expect((refused.body as { detail: string }).detail).toMatch(/database does not answer/);
  await app
    .anonymous()
    .post('/api/auth/sign-in')
    .send({ email, password: TEST_PASSWORD })
    .expect(503);
  await request(app.url).get('/api/openapi.json').expect(200);

  wire.mend();
  await health().expect(200);
  await agent.get('/api/users').expect(200);
  await app
    .anonymous()
    .post('/api/auth/sign-in')
    .send({ email, password: TEST_PASSWORD })
    .expect(200);
});
