import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Case } from '#shared/contracts/cases.ts';
import { ROUTES } from '#server/http/routes.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { makeToken } from '#tests/support/factories.ts';
import { atEnergy, body, fileCase, openCampaign } from '../cases/case-requests.ts';

/** Who asks, seen from a case that an experimentalist filed under a campaign. */
const WHO = [
  'owner',
  'member',
  'outsider',
  'theorist outside',
  'manager',
  'administrator',
  'nobody',
  'reading token of the owner',
  'writing token of the owner',
  'writing token of an outsider',
] as const;
type Who = (typeof WHO)[number];

interface Row {
  request: (agent: Agent, of: { filed: Case; etag: string }) => PromiseLike<{ status: number }>;
  expected: Record<Who, number>;
}

const readers = {
  owner: 200,
  member: 200,
  outsider: 404,
  'theorist outside': 404,
  manager: 200,
  administrator: 404,
  nobody: 401,
  'reading token of the owner': 200,
  'writing token of the owner': 200,
  'writing token of an outsider': 404,
};
const everyResearcher = (status: number) => ({
  owner: status,
  member: status,
  outsider: status,
  'theorist outside': status,
  manager: status,
  administrator: 403,
  nobody: 401,
  'reading token of the owner': status,
  'writing token of the owner': status,
  'writing token of an outsider': status,
});

const TABLE: Record<string, Row> = {
  'get /api/cases': {
    request: (agent) => agent.get('/api/cases'),
    expected: everyResearcher(200),
  },
  'post /api/cases': {
    request: (agent) => agent.post('/api/cases').send(body),
    expected: { ...everyResearcher(201), 'reading token of the owner': 403 },
  },
  'get /api/cases/:id': {
    request: (agent, { filed }) => agent.get(`/api/cases/${filed.id}`),
    expected: readers,
  },
  'get /api/cases/:id/versions': {
    request: (agent, { filed }) => agent.get(`/api/cases/${filed.id}/versions`),
    expected: readers,
  },
  'get /api/cases/:id/versions/:n': {
    request: (agent, { filed }) => agent.get(`/api/cases/${filed.id}/versions/1`),
    expected: readers,
  },
  'get /api/cases/:id/versions/:n/report.pdf': {
    request: (agent, { filed }) =>
      agent.get(`/api/cases/${filed.id}/versions/1/report.pdf?kind=proposal`),
    expected: readers,
  },
  'post /api/cases/:id/versions': {
    request: (agent, { filed, etag }) =>
      agent
        .post(`/api/cases/${filed.id}/versions`)
        .set('If-Match', etag)
        .send({ document: atEnergy(150) }),
    expected: {
      ...readers,
      owner: 201,
      member: 201,
      manager: 403,
      'reading token of the owner': 403,
      'writing token of the owner': 201,
    },
  },
  'post /api/cases/:id/withdraw': {
    request: (agent, { filed }) =>
      agent.post(`/api/cases/${filed.id}/withdraw`).send({ reason: 'Of the matrix.' }),
    expected: { ...readers, member: 403, manager: 403, 'reading token of the owner': 403 },
  },
};

let app: TestApp;
let agents: Record<Who, Agent>;
let campaignId: string;

function bearer(secret: string): Agent {
  return app.anonymous().set('Authorization', `Bearer ${secret}`);
}

beforeAll(async () => {
  app = await createTestApp();
  const owner = await app.person('experimentalist');
  const member = await app.person('theorist');
  const outsider = await app.person('experimentalist');
  campaignId = await openCampaign(app, 'Matrix', [owner.account, member.account]);
  await openCampaign(app, 'Another', [outsider.account]);
  const token = async (account: typeof owner.account, scope: 'read' | 'write') =>
    bearer((await makeToken(app.em(), { account, scope })).secret);
  agents = {
    owner: owner.agent,
    member: member.agent,
    outsider: outsider.agent,
    'theorist outside': await app.signedIn('theorist'),
    manager: await app.signedIn('manager'),
    administrator: await app.signedIn('administrator'),
    nobody: app.anonymous(),
    'reading token of the owner': await token(owner.account, 'read'),
    'writing token of the owner': await token(owner.account, 'write'),
    'writing token of an outsider': await token(outsider.account, 'write'),
  };
});
afterAll(() => app.close());

const caseRoutes = ROUTES.filter(({ path }) => path.startsWith('/api/cases'));

describe('who may do what to a case', () => {
  it('knows an expectation for every route of cases', () => {
    const routes = caseRoutes.map(({ method, path }) => `${method} ${path}`);
    expect(Object.keys(TABLE).sort()).toEqual(routes.sort());
  });

  for (const [route, { request, expected }] of Object.entries(TABLE)) {
    it.each(WHO)(`${route}: %s`, async (who) => {
      const target = await fileCase(agents.owner, { campaignId });
      const { status } = await request(agents[who], target);
      expect(status).toBe(expected[who]);
    });
  }

  it('the owner keeps a case without a campaign to itself and the lab managers', async () => {
    const { filed } = await fileCase(agents.owner);
    const path = `/api/cases/${filed.id}`;
    await agents.member.get(path).expect(404);
    await agents.manager.get(path).expect(200);
  });

  it('a lab manager writes and withdraws a case of its own, and reads others without editing', async () => {
    const { filed, etag } = await fileCase(agents.manager);
    const path = `/api/cases/${filed.id}`;
    expect((await agents.manager.get(path).expect(200)).body).toMatchObject({ mayEdit: true });
    const version = { document: atEnergy(10) };
    await agents.manager.post(`${path}/versions`).set('If-Match', etag).send(version).expect(201);
    await agents.manager.post(`${path}/withdraw`).send({ reason: 'Mine.' }).expect(200);
    const other = await fileCase(agents.owner);
    expect((await agents.manager.get(`/api/cases/${other.filed.id}`)).body).toMatchObject({
      mayEdit: false,
    });
  });

  it('guessed identifiers are not found, and say the same as foreign ones', async () => {
    const { filed } = await fileCase(agents.owner);
    const foreign = await agents.outsider.get(`/api/cases/${filed.id}`).expect(404);
    const guesses = [
      crypto.randomUUID(),
      String(filed.number),
      '00000000-0000-0000-0000-000000000000',
      "1' or '1'='1",
      '..',
      'null',
      `${filed.id}x`,
    ];
    for (const guess of guesses) {
      const answer = await agents.owner.get(`/api/cases/${encodeURIComponent(guess)}/versions`);
      expect(answer.status).toBe(404);
    }
    const unknown = await agents.outsider.get(`/api/cases/${crypto.randomUUID()}`).expect(404);
    expect(unknown.body).toEqual(foreign.body);
  });

  it('a list tells of exactly the cases that can be opened, for everyone', async () => {
    const all = await agents.manager.get('/api/cases?pageSize=200').expect(200);
    const ids = (all.body as { items: Case[] }).items.map(({ id }) => id);
    for (const who of ['owner', 'member', 'outsider', 'theorist outside'] as const) {
      const { items } = (await agents[who].get('/api/cases?pageSize=200').expect(200)).body as {
        items: Case[];
      };
      const listed = new Set(items.map(({ id }) => id));
      for (const id of ids) {
        const { status } = await agents[who].get(`/api/cases/${id}`);
        expect(status).toBe(listed.has(id) ? 200 : 404);
      }
    }
  });
});
