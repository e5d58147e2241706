import { once } from 'node:events';
import { connect, createServer } from 'node:net';
import type { AddressInfo, Socket } from 'node:net';
import request from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { TEST_PASSWORD, makeAccount } from '#tests/support/factories.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';

/** A wire to PostgreSQL that can be cut and mended. */
function createWire(target: { host: string; port: number }) {
  const open = new Set<Socket>();
  let cut = false;
  const server = createServer((near) => {
    if (cut) {
      near.destroy();
      return;
    }
    const far = connect(target);
    for (const [one, other] of [
      [near, far],
      [far, near],
    ] as const) {
      open.add(one);
      one.on('error', () => other.destroy());
      one.on('close', () => {
        open.delete(one);
        other.destroy();
      });
      one.pipe(other);
    }
  });
  return {
    server,
    cut() {
      cut = true;
      for (const socket of open) socket.destroy();
    },
    mend() {
      cut = false;
    },
  };
}

let app: TestApp;
let wire: ReturnType<typeof createWire>;
beforeAll(async () => {
  const admin = new URL(process.env['TEST_DATABASE_ADMIN_URL'] ?? '');
  wire = createWire({ host: admin.hostname, port: Number(admin.port) });
  wire.server.listen(0, '127.0.0.1');
  await once(wire.server, 'listening');
  const { port } = wire.server.address() as AddressInfo;
  app = await createTestApp({
    databaseUrl: (url) => Object.assign(new URL(url), { host: `127.0.0.1:${port}` }).href,
  });
});
afterAll(async () => {
  await app.close();
  wire.server.close();
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
