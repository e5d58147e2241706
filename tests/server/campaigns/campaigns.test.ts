import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createCampaign } from '#server/modules/campaigns/create-campaign.ts';
import { requireCampaign } from '#server/modules/campaigns/require-campaign.ts';
import { actorOf } from '#server/modules/users/find-account.ts';
import type { Account } from '#server/modules/users/account.entity.ts';
import { ROLES } from '#shared/roles.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { query } from '#tests/support/test-database.ts';
import { makeAccount } from '#tests/support/factories.ts';

let app: TestApp;
let manager: Account;
const campaigns: Record<string, string> = {};

async function open(name: string, memberIds: string[]): Promise<void> {
  const actor = actorOf(manager, { kind: 'session', sessionId: 'none' });
  const campaign = await createCampaign(
    { em: app.em(), actor, now: new Date() },
    { name, memberIds },
  );
  campaigns[name] = campaign.id;
}

beforeAll(async () => {
  app = await createTestApp();
  manager = await makeAccount(app.em(), { role: 'manager' });
});
afterAll(() => app.close());

describe('GET /api/campaigns', () => {
  it('shows members their own, managers all, and others none, by name', async () => {
    const member = await app.person('experimentalist');
    await open('winter beam', [member.account.id]);
    await open('Autumn beam', [member.account.id]);
    await open('Other people', []);
    const mine = await member.agent.get('/api/campaigns').expect(200);
    expect(mine.body).toEqual({
      items: [
        { id: campaigns['Autumn beam'], name: 'Autumn beam', member: true },
        { id: campaigns['winter beam'], name: 'winter beam', member: true },
      ],
      page: 1,
      pageSize: 50,
      total: 2,
    });
    const all = await (await app.signedIn(manager)).get('/api/campaigns').expect(200);
    expect(all.body).toMatchObject({
      total: 3,
      items: [{ member: false }, { name: 'Other people', member: false }, { member: false }],
    });
    for (const role of ROLES.filter((each) => each !== 'manager')) {
      const { agent } = await app.person(role);
      expect((await agent.get('/api/campaigns').expect(200)).body).toMatchObject({ total: 0 });
    }
    const paged = await member.agent.get('/api/campaigns?page=2&pageSize=1').expect(200);
    expect(paged.body).toMatchObject({ items: [{ name: 'winter beam' }], page: 2, total: 2 });
  });

  it('asks for a sign-in', async () => {
    await app.anonymous().get('/api/campaigns').expect(401);
  });
});

describe('requireCampaign', () => {
  it('says the same of a foreign campaign and of none', async () => {
    await open('Closed doors', []);
    const outsider = await makeAccount(app.em());
    const refusal = async (id: string) =>
      requireCampaign(app.em(), outsider, id).then(
        () => undefined,
        (fault: unknown) => fault,
      );
    const foreign = await refusal(campaigns['Closed doors'] ?? '');
    expect(foreign).toMatchObject({
      code: 'invalidInput',
      details: { errors: [{ path: '/campaignId' }] },
    });
    expect(await refusal(crypto.randomUUID())).toEqual(foreign);
    await requireCampaign(app.em(), manager, campaigns['Closed doors'] ?? '');
  });
});

describe('createCampaign', () => {
  it('writes the trail with its change, and keeps nothing of a name that is taken', async () => {
    await open('Only once', []);
    await expect(open('Only once', [])).rejects.toThrow(/campaigns_name_key/);
    const rows = await query(
      app.database.ownerUrl,
      `select count(*)::int as count from trail where action = 'campaign.create' and after->>'name' = 'Only once'`,
    );
    expect(rows).toEqual([{ count: 1 }]);
  });
});
