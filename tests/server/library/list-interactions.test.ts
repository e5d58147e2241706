import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { InteractionItem } from '#shared/contracts/library.ts';
import { searchSchema } from '#shared/contracts/search.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { read } from '../cases/case-requests.ts';
import { publish } from './library-requests.ts';

let app: TestApp;
let agent: Agent;
let retiredId: string;

const saxon = [
  {
    form: 'woodsSaxon',
    V0: { value: -50, unit: 'MeV' },
    R: { value: 4, unit: 'fm' },
    a: { value: 0.6, unit: 'fm' },
  },
];

beforeAll(async () => {
  app = await createTestApp();
  const theorist = await app.signedIn('theorist');
  agent = await app.signedIn('experimentalist');
  const validity = { words: 'Neutrons of a few MeV.', species: ['neutron'] };
  await publish(theorist, { name: 'Calcium well', terms: saxon, tags: ['optical'], validity });
  app.clock.advance(1000);
  await publish(theorist, { name: 'argon, screened', tags: ['gas', 'screened'] });
  app.clock.advance(1000);
  await publish(theorist, { name: '100% of it', source: 'Annals of the tests 3, 14' });
  app.clock.advance(1000);
  retiredId = (await publish(theorist, { name: 'Out of use', tags: ['gas'] })).published.id;
  await theorist.post(`/api/interactions/${retiredId}/retire`).send({ reason: 'x' }).expect(200);
});
afterAll(() => app.close());

const names = async (query: string) =>
  (await read<{ items: InteractionItem[] }>(agent, `/api/interactions?${query}`)).items.map(
    ({ name }) => name,
  );

describe('GET /api/interactions', () => {
  it('lists what is published by name, each with its newest version', async () => {
    const { items, total } = await read<{ items: InteractionItem[]; total: number }>(
      agent,
      '/api/interactions',
    );
    expect(total).toBe(3);
    expect(items.map(({ name }) => name)).toEqual([
      '100% of it',
      'argon, screened',
      'Calcium well',
    ]);
    expect(items[2]).toMatchObject({
      status: 'published',
      tags: ['optical'],
      version: { n: 1 },
      summary: 'Woods–Saxon, V₀ −50 MeV, R 4 fm, a 0.6 fm',
    });
  });

  it.each([
    ['sort=-name', ['Calcium well', 'argon, screened', '100% of it']],
    ['sort=updated', ['Calcium well', 'argon, screened', '100% of it']],
    ['sort=-updated', ['100% of it', 'argon, screened', 'Calcium well']],
    ['tag=gas', ['argon, screened']],
    ['tag=gas&status=all', ['argon, screened', 'Out of use']],
    ['status=retired', ['Out of use']],
    ['q=SAXON', ['Calcium well']],
    ['q=neutron', ['Calcium well']],
    ['q=annals%203', ['100% of it']],
    ['q=100%25', ['100% of it']],
    ['q=screened%20argon', ['argon, screened']],
    ['q=person', ['100% of it', 'argon, screened', 'Calcium well']],
    ['q=nowhere', []],
    ['page=2&pageSize=2', ['Calcium well']],
  ])('%s', async (query, expected) => {
    expect(await names(query)).toEqual(expected);
  });

  it.each(['sort=depth', 'status=old', 'page=0', 'pageSize=201'])('refuses %s', async (query) => {
    await agent.get(`/api/interactions?${query}`).expect(422);
  });
});

describe('GET /api/search', () => {
  const groupOf = async (who: Agent, q: string) =>
    searchSchema
      .parse((await who.get('/api/search').query({ q }).expect(200)).body)
      .groups.find(({ kind }) => kind === 'interactions');

  it('finds interactions for everyone, first where it is their name', async () => {
    for (const role of ['experimentalist', 'administrator'] as const) {
      const found = await groupOf(await app.signedIn(role), 'calcium well');
      expect(found?.hits.map(({ label }) => label)).toEqual(['Calcium well']);
      expect(found?.hits[0]?.detail).toMatch(/^Version 1: Woods–Saxon/);
    }
    const answer = await agent.get('/api/search').query({ q: 'argon, screened' }).expect(200);
    expect(searchSchema.parse(answer.body).groups[0]?.kind).toBe('interactions');
  });

  it('leaves retired ones out', async () => {
    expect(await groupOf(agent, 'out of use')).toBeUndefined();
  });
});
