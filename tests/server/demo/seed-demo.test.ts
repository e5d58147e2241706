import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ENGINE } from '#server/compute/engine-kinds.ts';
import type { Compute } from '#server/compute/compute.ts';
import { removeDemo } from '#server/db/seeders/demo/remove-demo.ts';
import { DEMO_ACCOUNTS, DEMO_CAMPAIGNS, DEMO_PASSWORD } from '#server/db/seeders/demo/scenario.ts';
import { DEMO_CASES, seedDemo } from '#server/db/seeders/demo/seed-demo.ts';
import { openOrm } from '#server/db/orm.ts';
import type { CaseListItem } from '#shared/contracts/cases.ts';
import type { Role } from '#shared/roles.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { makeAccount } from '#tests/support/factories.ts';
import { query } from '#tests/support/test-database.ts';
import { fileCase, read, save } from '../cases/case-requests.ts';

const compute: Compute = (kind, input) => Promise.resolve(ENGINE[kind](input));
const clock = () => new Date();

const seed = (app: TestApp, changes: { compute?: Compute } = {}): Promise<number> =>
  seedDemo({ em: app.em(), compute, clock, passwordCost: 4, ...changes });

async function demoAgent(app: TestApp, role: Role): Promise<Agent> {
  const agent = app.anonymous();
  const email = DEMO_ACCOUNTS.find((account) => account.role === role)?.email;
  await agent.post('/api/auth/sign-in').send({ email, password: DEMO_PASSWORD }).expect(200);
  return agent;
}
const CASES = DEMO_CASES.length;
const VERSIONS = DEMO_CASES.reduce((sum, { versions }) => sum + versions.length, 0);
const CAMPAIGNS = Object.keys(DEMO_CAMPAIGNS).length;

const titles = async (agent: Agent): Promise<string[]> =>
  (await read<{ items: CaseListItem[] }>(agent, '/api/cases?sort=number&pageSize=50')).items.map(
    ({ title }) => title,
  );
const counts = (app: TestApp) =>
  query(
    app.database.ownerUrl,
    `select (select count(*)::int from accounts) as accounts, (select count(*)::int from campaigns) as campaigns,
       (select count(*)::int from cases) as cases, (select count(*)::int from case_versions) as versions,
       (select last from case_numbers) as last`,
  );

describe('seedDemo', () => {
  let app: TestApp;
  beforeAll(async () => {
    app = await createTestApp();
  });
  afterAll(() => app.close());

  it('holds at least fourteen worked cases, each under a title of its own', () => {
    expect(CASES).toBeGreaterThanOrEqual(14);
    expect(new Set(DEMO_CASES.map(({ title }) => title)).size).toBe(CASES);
  });

  it('leaves nothing behind when it dies mid-way', async () => {
    let calls = 0;
    const failing: Compute = (kind, input) => {
      calls += 1;
      if (calls === 5) throw new Error('killed');
      return compute(kind, input);
    };
    await expect(seed(app, { compute: failing })).rejects.toThrow('killed');
    expect(await counts(app)).toEqual([
      { accounts: 0, campaigns: 0, cases: 0, versions: 0, last: 0 },
    ]);
  });

  it('fills an empty database once, also when two start together', async () => {
    expect((await Promise.all([seed(app), seed(app)])).sort((x, y) => x - y)).toEqual([0, CASES]);
    expect(await seed(app)).toBe(0);
    expect(await counts(app)).toEqual([
      { accounts: 4, campaigns: CAMPAIGNS, cases: CASES, versions: VERSIONS, last: CASES },
    ]);
  });

  it('shows sharing: each account sees its own and its campaigns’ cases', async () => {
    const seen = {
      experimentalist: await titles(await demoAgent(app, 'experimentalist')),
      theorist: await titles(await demoAgent(app, 'theorist')),
      manager: await titles(await demoAgent(app, 'manager')),
    };
    expect(seen.manager).toEqual(DEMO_CASES.map(({ title }) => title));
    const sharedWith = (role: Role) =>
      DEMO_CASES.filter(({ campaign, versions: [{ author }] }) => {
        const members: readonly Role[] = campaign ? DEMO_CAMPAIGNS[campaign].members : [];
        return author === role || members.includes(role);
      }).map(({ title }) => title);
    for (const role of ['experimentalist', 'theorist'] as const) {
      expect(seen[role]).toEqual(sharedWith(role));
      expect(seen[role].length).toBeLessThan(CASES);
    }
    expect(seen.experimentalist).not.toContain('Thermal neutrons on bound nickel');
    expect(seen.theorist).not.toContain('Source alphas on a gold foil');
    expect(seen.theorist).toContain('Forward cone of 1 keV electrons on carbon');
    await (await demoAgent(app, 'administrator')).get('/api/cases').expect(403);
  });

  it('says of every case what it shows, and computes each by the one way', async () => {
    const agent = await demoAgent(app, 'manager');
    const { items } = await read<{ items: CaseListItem[] }>(
      agent,
      '/api/cases?sort=number&pageSize=50',
    );
    expect(items.map(({ number }) => number)).toEqual(DEMO_CASES.map((_, i) => i + 1));
    for (const item of items) {
      expect(item.version.note?.length).toBeGreaterThan(40);
      const version = await read<{ document: object; result: { estimate: object } }>(
        agent,
        `/api/cases/${item.id}/versions/${item.version.n}`,
      );
      const again = await agent.post('/api/estimates').send(version.document).expect(200);
      expect(again.body).toEqual(version.result.estimate);
    }
    expect(items.map(({ summary }) => summary.beam)).toContain(
      'neutron, 1.8 angstrom (25.2482 meV)',
    );
  });

  it('does nothing where there is anything already', async () => {
    const other = await createTestApp();
    await makeAccount(other.em());
    expect(await seed(other)).toBe(0);
    await other.close();
  });
});

describe('removeDemo', () => {
  let app: TestApp;
  beforeAll(async () => {
    app = await createTestApp();
    await seed(app);
  });
  afterAll(() => app.close());

  async function remove() {
    const { runtimeUrl: databaseUrl, ownerUrl } = app.database;
    const orm = await openOrm({ databaseUrl, ownerUrl, poolSize: 1 });
    return removeDemo(orm.em.fork(), clock()).finally(() => orm.close(true));
  }

  it('is refused to the runtime role, and then takes nothing', async () => {
    const before = await counts(app);
    await expect(removeDemo(app.em(), clock())).rejects.toThrow(/permission denied/);
    expect(await counts(app)).toEqual(before);
  });

  it('takes the demo’s cases and sign-in, keeps names, the trail and the work of others', async () => {
    const demo = await demoAgent(app, 'experimentalist');
    const person = await app.person('theorist');
    const [campaign] = await query(
      app.database.ownerUrl,
      `select id from campaigns where name = 'Carbon film survey'`,
    );
    const campaignId = String(campaign?.['id']);
    await query(app.database.ownerUrl, 'insert into campaign_members values ($1, $2, now())', [
      campaignId,
      person.account.id,
    ]);
    const { filed, etag } = await fileCase(person.agent, { campaignId, title: 'Ours' });
    await save(demo, filed.id, etag).expect(201);
    const trail = await query(app.database.ownerUrl, 'select count(*)::int as n from trail');

    expect(await remove()).toEqual({ accounts: 4, cases: CASES });

    const after = await query(app.database.ownerUrl, 'select count(*)::int as n from trail');
    await demo.get('/api/cases').expect(401);
    await expect(demoAgent(app, 'manager')).rejects.toThrow();
    const manager = await app.signedIn('manager');
    expect(await titles(manager)).toEqual(['Ours']);
    expect(await read(manager, `/api/cases/${filed.id}/versions/2`)).toMatchObject({
      author: { name: 'Experimentalist' },
    });
    expect(Number(after[0]?.['n'])).toBe(Number(trail[0]?.['n']) + 1);
    const campaigns = await query(app.database.ownerUrl, 'select name from campaigns');
    expect(campaigns).toEqual([{ name: 'Carbon film survey' }]);
  });

  it('puts the guards back, finds nothing a second time, and goes on counting', async () => {
    expect(await remove()).toEqual({ accounts: 0, cases: 0 });
    await expect(query(app.database.ownerUrl, 'delete from case_versions')).rejects.toThrow(
      /only grows/,
    );
    expect(await seed(app)).toBe(0);
    const { filed } = await fileCase(await app.signedIn('theorist'));
    expect(filed.number).toBe(CASES + 2);
  });
});
