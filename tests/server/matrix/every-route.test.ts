import request from 'supertest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { withOpenApi } from '#server/http/openapi.ts';
import { ROUTES } from '#server/http/routes.ts';
import { makeToken } from '#tests/support/factories.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { sendRoute, walkRoute } from '#tests/support/walk-routes.ts';
import type { Rule } from '#tests/support/walk-routes.ts';

const files = import.meta.glob<Record<string, Rule>>('./*.rules.ts', {
  eager: true,
  import: 'RULES',
});
const rules = Object.fromEntries(Object.values(files).flatMap((file) => Object.entries(file)));

const ANY_ID = '00000000-0000-4000-8000-000000000000';
const anyParams = { id: ANY_ID, n: '1' };

let app: TestApp;
beforeAll(async () => {
  app = await createTestApp();
});
afterAll(() => app.close());

const described = { version: '0', https: false, publicUrl: undefined };
const all = withOpenApi(ROUTES, described);
const guarded = all.filter(({ access }) => access !== 'public');

test('every route has a rule, and every rule a route', () => {
  expect(Object.keys(rules).sort()).toEqual(all.map(({ operationId }) => operationId).sort());
});

describe.each(all.map((route) => [route.operationId, route] as const))('%s', (id, route) => {
  test('every role and standing is answered as the rule says', async () => {
    const rule = rules[id];
    if (!rule) throw new Error(`Add a rule for ${id} to a file *.rules.ts in this folder.`);
    expect(route.access).toBe(rule.access);
    const walked = await walkRoute(app, route, rule);
    expect(walked.filter(({ expected, got }) => expected !== got)).toEqual([]);
    expect(walked.filter(({ status }) => status >= 500)).toEqual([]);
  }, 120_000);
});

test.each(guarded.map((route) => [route.operationId, route] as const))(
  '%s is 401 to whoever is not signed in',
  async (_id, route) => {
    const { status } = await sendRoute(app.anonymous(), route, { params: anyParams, body: {} });
    expect(status).toBe(401);
  },
);

test.each(guarded.filter((route) => route.changes).map((route) => [route.operationId, route]))(
  '%s is 403 to a read-only token, and from another origin',
  async (_id, route) => {
    const { secret } = await makeToken(app.em(), { scope: 'read' });
    const headers = { Authorization: `Bearer ${secret}` };
    const byToken = await sendRoute(request.agent(app.url), route, { params: anyParams, headers });
    expect(byToken.status).toBe(403);

    const { agent } = await app.person('administrator');
    const foreign = { Origin: 'https://elsewhere.example.org' };
    const other = await sendRoute(agent, route, { params: anyParams, headers: foreign });
    expect(other.status).toBe(403);
    expect(JSON.stringify(other.body)).toContain('elsewhere.example.org');
  },
);
