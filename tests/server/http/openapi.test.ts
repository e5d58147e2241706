import request from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { withOpenApi } from '#server/http/openapi.ts';
import { ROUTES } from '#server/http/routes.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';

interface Operation {
  operationId: string;
  security: object[];
  responses: Record<string, { content?: object }>;
  parameters?: { name: string; in: string; required: boolean }[];
}
interface Document {
  openapi: string;
  paths: Record<string, Record<string, Operation>>;
  components: { schemas: Record<string, object> };
}

let app: TestApp;
let document: Document;
beforeAll(async () => {
  app = await createTestApp();
  document = (await request(app.url).get('/api/openapi.json').expect(200)).body as Document;
});
afterAll(() => app.close());

const all = withOpenApi(ROUTES, { version: '0', https: false, publicUrl: undefined });

test('it is OpenAPI 3.1 and describes every route once', () => {
  expect(document.openapi).toBe('3.1.0');
  const described = Object.values(document.paths).flatMap((path) => Object.values(path));
  expect(described.map(({ operationId }) => operationId).sort()).toEqual(
    all.map(({ operationId }) => operationId).sort(),
  );
});

test('every reference leads somewhere, and no schema is left in $defs', () => {
  const text = JSON.stringify(document);
  const references = [...text.matchAll(/"\$ref":"([^"]+)"/g)].map(([, reference]) => reference);
  expect(references.length).toBeGreaterThan(10);
  for (const reference of new Set(references)) {
    const name = /^#\/components\/schemas\/(.+)$/.exec(reference ?? '')?.[1] ?? '';
    expect(document.components.schemas).toHaveProperty([name]);
  }
  expect(text).not.toContain('$defs');
});

test('what is open says so, everything else names session and token', () => {
  for (const route of all) {
    const path = route.path.replace(/:(\w+)/g, '{$1}');
    const operation = document.paths[path]?.[route.method];
    const expected = route.access === 'public' ? [] : [{ session: [] }, { personalToken: [] }];
    expect([route.operationId, operation?.security]).toEqual([route.operationId, expected]);
    expect(Object.keys(operation?.responses ?? {})).toContain(String(route.status));
    const inPath = [...route.path.matchAll(/:(\w+)/g)].map(([, name]) => name);
    const parameters = operation?.parameters ?? [];
    expect(parameters.filter((one) => one.in === 'path').map(({ name }) => name)).toEqual(inPath);
  }
});

test('a save names the headers it reads', () => {
  const save = document.paths['/api/cases/{id}/versions']?.post;
  const headers = (save?.parameters ?? []).filter((one) => one.in === 'header');
  expect(headers.map(({ name }) => name)).toEqual(['If-Match', 'Idempotency-Key']);
});

test('nothing of the server’s inside is in it', () => {
  expect(JSON.stringify(document)).not.toMatch(/passwordHash|tokenHash|signingKey/);
});
