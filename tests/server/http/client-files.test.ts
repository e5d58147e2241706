import { mkdirSync, mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import request from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';

const PAGE = '<!doctype html><title>Tallybarn</title>';
let app: TestApp;
beforeAll(async () => {
  const parent = mkdtempSync(join(tmpdir(), 'client-'));
  const clientDir = join(parent, 'client');
  mkdirSync(join(clientDir, 'assets'), { recursive: true });
  writeFileSync(join(parent, 'outside.txt'), 'never served');
  writeFileSync(join(clientDir, 'index.html'), PAGE);
  writeFileSync(join(clientDir, 'icon.svg'), '<svg xmlns="http://www.w3.org/2000/svg"/>');
  writeFileSync(join(clientDir, '.hidden'), 'never served');
  writeFileSync(join(clientDir, 'assets', 'main-abc123.js'), 'export {};');
  app = await createTestApp({ config: { clientDir } });
});
afterAll(() => app.close());

test('hashed assets are kept for good', async () => {
  const { headers } = await request(app.url).get('/assets/main-abc123.js').expect(200);
  expect(headers['cache-control']).toMatch(/max-age=31536000, immutable/);
});

test.each(['/', '/cases', '/cases/0197/record?at=1', '/index.html'])(
  'the page answers %s and is asked for each time',
  async (path) => {
    const answer = await request(app.url).get(path).expect(200);
    expect(answer.text).toBe(PAGE);
    expect(answer.headers['cache-control']).toMatch(/no-cache|max-age=0/);
    expect(answer.headers['content-security-policy']).toMatch(/script-src 'self'/);
  },
);

test('other files are asked for again each time', async () => {
  const { headers } = await request(app.url).get('/icon.svg').expect(200);
  expect(headers['cache-control']).toMatch(/max-age=0/);
  expect(headers['content-type']).toMatch(/svg/);
});

test.each(['/assets/missing.js', '/api/missing'])('%s is 404 and never the page', async (path) => {
  const { text, headers } = await request(app.url).get(path).expect(404);
  expect(text).not.toContain('<!doctype');
  expect(headers['content-type']).toMatch(/problem\+json/);
});

test.each(['/../outside.txt', '/..%2foutside.txt', '/assets/..%2f..%2foutside.txt', '/.hidden'])(
  '%s serves nothing from outside',
  async (path) => {
    const answer = await request(app.url).get(path);
    expect(answer.text).not.toContain('never served');
  },
);

test('another method than GET is no page', async () => {
  await request(app.url).post('/cases').set('Origin', app.url).expect(404);
});
