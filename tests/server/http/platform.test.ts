import request from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { z } from 'zod';
import { defineRoute } from '#server/http/route.ts';
import { anglesSchema, projectileSchema } from '#shared/contracts/estimates.ts';
import { quantitySchema } from '#shared/units/quantity.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';

const echoSchema = z.strictObject({
  projectile: projectileSchema.optional(),
  angles: anglesSchema.optional(),
  energy: quantitySchema('energy').optional(),
  count: z.int().optional(),
  mode: z.enum(['slow', 'fast']).optional(),
  note: z.string().optional(),
  table: z.record(z.string(), z.number()).optional(),
});

const routes = [
  defineRoute({
    method: 'post',
    path: '/api/echo/:id',
    operationId: 'echo',
    summary: 'Answers what was sent',
    tag: 'Test',
    access: 'public',
    params: z.object({ id: z.uuid() }),
    query: z.object({ page: z.coerce.number().int().default(1) }),
    body: echoSchema,
    response: z.object({ body: z.unknown(), page: z.int(), polluted: z.boolean() }),
    handler: ({ body, query, setHeader }) => {
      setHeader('ETag', '"1"');
      return { body, page: query.page, polluted: 'polluted' in {} };
    },
  }),
  defineRoute({
    method: 'post',
    path: '/api/bodyless',
    operationId: 'bodyless',
    summary: 'Takes no body',
    tag: 'Test',
    access: 'public',
    handler: () => undefined,
  }),
  defineRoute({
    method: 'get',
    path: '/api/broken',
    operationId: 'broken',
    summary: 'Throws a bug that holds a secret',
    tag: 'Test',
    access: 'public',
    handler: () => {
      throw new Error('the inner secret of a bug');
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/not-finite',
    operationId: 'notFinite',
    summary: 'Answers NaN where no schema looks',
    tag: 'Test',
    access: 'public',
    response: z.object({ values: z.unknown() }),
    handler: () => ({ values: [1, { inner: Number.NaN }] }),
  }),
  defineRoute({
    method: 'get',
    path: '/api/outside',
    operationId: 'outside',
    summary: 'Breaks its own contract',
    tag: 'Test',
    access: 'public',
    response: z.object({ value: z.number().max(1) }),
    handler: () => ({ value: 2 }),
  }),
];

const ID = '00000000-0000-4000-8000-000000000000';
let app: TestApp;
beforeAll(async () => {
  app = await createTestApp({ routes });
});
afterAll(() => app.close());

interface ProblemBody {
  status: number;
  code: string;
  detail: string;
  errors?: { path: string; message: string }[];
}
const echo = () => request(app.url).post(`/api/echo/${ID}`);
const sendText = (text: string, type = 'application/json') =>
  echo().set('Content-Type', type).send(text);

test('a good request is answered, with the headers a handler sets and none that is stale', async () => {
  const answer = await sendText('{"count": 3}').expect(200);
  expect(answer.body).toEqual({ body: { count: 3 }, page: 1, polluted: false });
  expect(answer.headers).toMatchObject({ etag: '"1"', 'cache-control': 'no-store' });
  expect(answer.headers['x-powered-by']).toBeUndefined();
  expect(answer.headers['x-request-id']).toMatch(/^[\w-]{36}$/);
});

test('a request identifier is taken over when it is harmless', async () => {
  const kept = await echo().set('X-Request-Id', 'trace-12345678').send({}).expect(200);
  expect(kept.headers['x-request-id']).toBe('trace-12345678');
  const made = await echo().set('X-Request-Id', 'x y" {}').send({}).expect(200);
  expect(made.headers['x-request-id']).not.toContain(' ');
});

test.each([
  ['nothing at all', ''],
  ['half an object', '{"count": '],
  ['NaN', '{"count": NaN}'],
  ['two values', '{} {}'],
])('%s is malformed (400)', async (_what, text) => {
  const answer = await sendText(text).expect(400);
  const headers = answer.headers as Record<string, string>;
  const body = answer.body as unknown;
  expect(body).toMatchObject({ code: 'malformed', status: 400 });
  expect(headers['content-type']).toBe('application/problem+json; charset=utf-8');
});

test('no body and no content type where a body is due is malformed (400)', async () => {
  expect((await echo().expect(400)).body).toMatchObject({ code: 'malformed' });
});

test('text that is not UTF-8 is malformed (400)', async () => {
  const fetched = await fetch(`${app.url}/api/echo/${ID}`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: Buffer.from([0x7b, 0x22, 0xff, 0x22, 0x3a, 0x31, 0x7d]),
  });
  expect(fetched.status).toBe(400);
});

test.each([
  'text/plain',
  'application/x-www-form-urlencoded',
  'multipart/form-data; boundary=x',
  'application/jsonp',
  'application/json; charset=latin1',
])('the content type %s is refused (415)', async (type) => {
  const body = (await sendText('{"count":1}', type).expect(415)).body as unknown;
  expect(body).toMatchObject({ code: 'unsupportedMediaType' });
});

test('an unknown content encoding is refused (415)', async () => {
  await sendText('{}').set('Content-Encoding', 'zip').expect(415);
});

test('a body without a content type is refused (415), a POST without a body needs none', async () => {
  const untyped = await fetch(`${app.url}/api/bodyless`, {
    method: 'POST',
    body: Buffer.from('x'),
  });
  expect(untyped.status).toBe(415);
  await request(app.url).post('/api/bodyless').expect(204);
  await request(app.url).post('/api/bodyless').send({}).expect(204);
  await request(app.url).post('/api/bodyless').send({ more: 1 }).expect(422);
});

test('ten million angles are too large (413), and the server still answers', async () => {
  const text = `{"angles":{"values":[${'0,'.repeat(1e7)}0]}}`;
  const answer = await fetch(`${app.url}/api/echo/${ID}`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: text,
  });
  expect(answer.status).toBe(413);
  await sendText('{}').expect(200);
});

test('half a million angles within the limit are invalid (422), in one error', async () => {
  const body = (await sendText(`{"angles":{"values":[${'0,'.repeat(4e5)}0]}}`).expect(422))
    .body as unknown;
  expect((body as ProblemBody).errors).toEqual([
    { path: '/angles/values', message: 'At most 5000 angles in one request.' },
  ]);
});

test('a body that grows when unpacked is too large (413)', async () => {
  const { gzipSync } = await import('node:zlib');
  const answer = await fetch(`${app.url}/api/echo/${ID}`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json', 'Content-Encoding': 'gzip' },
    body: gzipSync(Buffer.alloc(50_000_000, ' ')),
  });
  expect(answer.status).toBe(413);
});

test.each([
  ['{"energy": {"value": 1e400, "unit": "eV"}}', '/energy/value', /too large/],
  ['{"energy": {"value": -1e999, "unit": "eV"}}', '/energy/value', /too large/],
  ['{"energy": {"value": "1", "unit": "eV"}}', '/energy/value', /not text/],
  ['{"energy": {"value": 1, "unit": "ev"}}', '/energy/unit', /did you mean eV/],
  ['{"energy": {"value": null, "unit": "eV"}}', '/energy/value', /Give a number/],
  ['{"count": 1.5}', '/count', /whole number/],
  ['{"count": true}', '/count', /must be a number, not true/],
  ['{"mode": "quick"}', '/mode', /"slow", "fast"/],
  ['{"modes": "fast"}', '/modes', /not known here/],
  ['{"a/b~c": 1}', '/a~1b~0c', /not known here/],
  ['{"note": "a\\u0000b"}', '/note', /NUL/],
  ['{"note": "\\ud800"}', '/note', /surrogate/],
  ['{"table": {"a\\u0000": 1}}', '/table/a\u0000', /rename/],
  ['{"__proto__": {"polluted": true}}', '/__proto__', /__proto__/],
  ['{"table": {"__proto__": 1}}', '/table/__proto__', /__proto__/],
  ['{"constructor": {"prototype": {"polluted": true}}}', '/constructor', /not known here/],
  ['{"projectile": {"species": "elektron"}}', '/projectile/species', /"electron"/],
  ['{"projectile": {"nuclide": 12}}', '/projectile/nuclide', /must be text/],
  ['{"projectile": "electron"}', '/projectile', /A projectile is/],
  ['{"projectile": {"species": "custom", "charge": 1, "spin": 0}}', '/projectile/mass', /mass/],
  ['{"angles": {"values": []}}', '/angles/values', /at least one angle/],
  ['{"angles": {"from": 0, "to": 180, "count": 1e7}}', '/angles/count', /At most 5000/],
  ['{"angles": {"values": [0, "1"]}}', '/angles/values/1', /must be a number/],
  ['[]', '', /object/],
  ['null', '', /object/],
])('%s is invalid (422) and points to what is wrong', async (text, path, words) => {
  const problem = (await sendText(text).expect(422)).body as ProblemBody;
  expect(problem.code).toBe('invalidInput');
  expect(problem.errors?.map((error) => error.path)).toEqual([path]);
  expect(problem.errors?.[0]?.message).toMatch(words);
  expect(problem.detail).toContain(problem.errors?.[0]?.message);
  expect((await sendText('{}').expect(200)).body).toMatchObject({ polluted: false });
});

test('nesting without end is refused, not followed', async () => {
  const depth = 200_000;
  const text = `{"note": ${'['.repeat(depth)}${']'.repeat(depth)}}`;
  const problem = (await sendText(text).expect(422)).body as ProblemBody;
  expect(problem.errors?.[0]?.message).toMatch(/64 levels/);
});

test('a query is validated too, its faults pointed to', async () => {
  const body = (await request(app.url).post(`/api/echo/${ID}?page=x`).send({}).expect(422))
    .body as unknown;
  expect((body as ProblemBody).errors?.[0]?.path).toBe('/page');
});

test('an address that names nothing is 404, in words, as a problem', async () => {
  for (const path of ['/api/echo/17', '/api/nothing', '/api', '/api/', '/api/echo']) {
    const answer = await request(app.url).post(path).send({}).expect(404);
    const headers = answer.headers as Record<string, string>;
    const body = answer.body as unknown;
    expect([path, body]).toMatchObject([path, { code: 'notFound' }]);
    expect(headers['content-type']).toMatch(/problem\+json/);
  }
});

test('an address that cannot be decoded is malformed (400)', async () => {
  await request(app.url).post('/api/echo/%E0%A4%A').send({}).expect(400);
});

test('another method at a known address is 405 and names those that are known', async () => {
  const answer = await request(app.url).put('/api/bodyless').expect(405);
  const headers = answer.headers as Record<string, string>;
  const body = answer.body as unknown;
  expect(headers['allow']).toBe('POST');
  expect(body).toMatchObject({ code: 'methodNotAllowed' });
});

test('a bug is logged whole and answered blandly', async () => {
  const answer = await request(app.url).get('/api/broken').expect(500);
  const headers = answer.headers as Record<string, string>;
  const body = answer.body as unknown;
  const problem = body as ProblemBody;
  expect(problem).toMatchObject({ code: 'internal' });
  expect(JSON.stringify(problem)).not.toMatch(/secret|platform\.test/);
  expect(problem.detail).toContain(headers['x-request-id']);
  expect(app.logs()).toMatch(/the inner secret of a bug.*platform\.test\.ts/);
});

test('a number that is not finite never leaves', async () => {
  await request(app.url).get('/api/not-finite').expect(500);
  expect(app.logs()).toMatch(/non-finite number.*inner/);
});

test('an answer outside its contract is a bug', async () => {
  await request(app.url).get('/api/outside').expect(500);
  expect(app.logs()).toMatch(/answer of outside breaks its contract/);
});

test('headers keep a page to its own origin, without asking plain-http labs for https', async () => {
  const { headers } = await request(app.url).get('/api/openapi.json').expect(200);
  const policy = String(headers['content-security-policy']);
  expect(policy).toMatch(/default-src 'self'/);
  expect(policy).toMatch(/frame-ancestors 'none'/);
  expect(policy).not.toMatch(/unsafe|upgrade-insecure|https?:/);
  expect(headers['strict-transport-security']).toBeUndefined();
  expect(headers['x-content-type-options']).toBe('nosniff');
  expect(headers['access-control-allow-origin']).toBeUndefined();
});
