import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { CaseListItem } from '#shared/contracts/cases.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { makeAccount } from '#tests/support/factories.ts';
import type { Account } from '#server/modules/users/account.entity.ts';
import { atEnergy, fileCase, openCampaign, read, save } from './case-requests.ts';

interface Page {
  items: CaseListItem[];
  page: number;
  pageSize: number;
  total: number;
}

let app: TestApp;
let agent: Agent;
let account: Account;
let manager: Agent;
let campaignId: string;

const gaussian = {
  ...atEnergy(500),
  interaction: {
    terms: [
      { form: 'gaussian', V0: { value: -5, unit: 'eV' }, a: { value: 2, unit: 'angstrom' } },
      { form: 'squareWell', V0: { value: 1, unit: 'eV' }, R: { value: 1, unit: 'angstrom' } },
    ],
  },
};

beforeAll(async () => {
  app = await createTestApp();
  account = await makeAccount(app.em(), { role: 'experimentalist', name: 'Ada Öberg' });
  agent = await app.signedIn(account);
  manager = await app.signedIn('manager');
  campaignId = await openCampaign(app, 'Winter beam', [account]);
  const other = await app.person('theorist');
  await fileCase(agent, { title: 'Zebra stripes', tags: ['striped', 'shared'] });
  await fileCase(agent, { title: 'apple 100% pure', tags: ['fruit'], campaignId });
  await fileCase(other.agent, { title: 'Hidden', tags: ['shared'], document: gaussian });
  await fileCase(agent, { title: 'Mango', tags: [], document: gaussian });
  const { filed, etag } = await fileCase(agent, { title: 'Under_score \\ back' });
  await save(agent, filed.id, etag, { title: 'Renamed', tags: ['fruit'] }).expect(201);
  const withdrawn = await fileCase(agent, { title: 'Gone' });
  await agent.post(`/api/cases/${withdrawn.filed.id}/withdraw`).send({ reason: 'x' }).expect(200);
});
afterAll(() => app.close());

const list = (query: Record<string, string>, who = agent) =>
  read<Page>(who, `/api/cases?${new URLSearchParams(query).toString()}`);
const titles = async (query: Record<string, string>, who = agent) =>
  (await list({ sort: 'number', ...query }, who)).items.map(({ title }) => title);

describe('GET /api/cases', () => {
  it('shows what one may read and counts nothing else', async () => {
    const mine = await list({ sort: 'number' });
    expect(mine).toMatchObject({ page: 1, pageSize: 50, total: 5 });
    expect(mine.items.map(({ number }) => number)).toEqual([1, 2, 4, 5, 6]);
    expect((await list({}, manager)).total).toBe(6);
    expect((await list({}, (await app.person('theorist')).agent)).total).toBe(0);
    expect(mine.items[1]).toMatchObject({
      campaign: { id: campaignId, name: 'Winter beam' },
      owner: { id: account.id, name: 'Ada Öberg' },
      summary: { beam: 'electron, 100 eV', interaction: 'Yukawa, V₀ −10 eV, a 1 Å' },
      version: { n: 1 },
    });
    expect(mine.items[3]).toMatchObject({ title: 'Renamed', version: { n: 2 } });
  });

  it.each([
    ['zebra', ['Zebra stripes']],
    ['STRIP zeb', ['Zebra stripes']],
    ['fruit', ['apple 100% pure', 'Renamed']],
    ['winter', ['apple 100% pure']],
    ['öberg gauss', ['Mango']],
    ['squareWell', ['Mango']],
    ['square well', ['Mango']],
    ['500 eV', ['Mango']],
    ['#2', ['apple 100% pure']],
    ['#3', []],
    ['4', ['Mango']],
    ['100%', ['apple 100% pure']],
    ['%', ['apple 100% pure']],
    ['_', []],
    ['under_score', []],
    ["'", []],
    ['\\', []],
    ["\\' or true --", []],
    ['? :x $1', []],
    ['', ['Zebra stripes', 'apple 100% pure', 'Mango', 'Renamed', 'Gone']],
  ])('finds by %j', async (q, expected) => {
    expect((await titles({ q })).filter((title) => expected.includes(title))).toEqual(expected);
    if (q !== '4') expect(await titles({ q })).toEqual(expected);
  });

  it('filters by status, tag, campaign and owner, alone and together', async () => {
    expect(await titles({ status: 'withdrawn' })).toEqual(['Gone']);
    expect(await titles({ status: 'released' })).toEqual([]);
    expect(await titles({ tag: 'fruit' })).toEqual(['apple 100% pure', 'Renamed']);
    expect(await titles({ tag: 'frui' })).toEqual([]);
    expect(await titles({ campaign: campaignId })).toEqual(['apple 100% pure']);
    expect(await titles({ campaign: "x' or true" })).toEqual([]);
    expect(await titles({ tag: 'shared' }, manager)).toEqual(['Zebra stripes', 'Hidden']);
    expect(await titles({ tag: 'shared', q: 'gaussian' }, manager)).toEqual(['Hidden']);
    expect(await titles({ owner: 'me' }, manager)).toEqual([]);
    expect((await titles({ owner: 'all' }, manager)).length).toBe(6);
  });

  it('sorts by number, title without regard to case, and last change', async () => {
    const order = async (sort: string) => titles({ sort });
    const byTitle = ['apple 100% pure', 'Gone', 'Mango', 'Renamed', 'Zebra stripes'];
    expect(await order('title')).toEqual(byTitle);
    expect(await order('-title')).toEqual([...byTitle].reverse());
    expect(await order('-number')).toEqual([...(await order('number'))].reverse());
    expect(await order('updated')).toEqual([...(await order('-updated'))].reverse());
    expect((await list({})).items[0]?.title).toBe('Gone');
  });

  it('pages after filtering', async () => {
    const page = await list({ sort: 'number', page: '2', pageSize: '2' });
    expect(page).toMatchObject({ page: 2, pageSize: 2, total: 5 });
    expect(page.items.map(({ title }) => title)).toEqual(['Mango', 'Renamed']);
    expect(await list({ page: '1000000', pageSize: '200' })).toMatchObject({ items: [], total: 5 });
  });

  it.each(['page=0', 'page=x', 'pageSize=201', 'status=gone', 'sort=size', 'owner=you', 'q=a&q=b'])(
    'refuses ?%s',
    async (query) => {
      const refused = await agent.get(`/api/cases?${query}`).expect(422);
      const name = query.split('=')[0] ?? '';
      expect(refused.body).toMatchObject({ errors: [{ path: `/${name}` }] });
    },
  );
});
