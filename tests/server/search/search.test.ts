import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { HITS_PER_GROUP, searchSchema } from '#shared/contracts/search.ts';
import type { SearchAnswer, SearchKind } from '#shared/contracts/search.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { fileCase, openCampaign } from '../cases/case-requests.ts';

let app: TestApp;
let owner: Agent;
let member: Agent;
let outsider: Agent;
let manager: Agent;
let administrator: Agent;

const calcium = { kind: 'nuclide', nuclide: 'Ca-40' };

beforeAll(async () => {
  app = await createTestApp();
  const mine = await app.person('experimentalist');
  const shared = await app.person('theorist');
  owner = mine.agent;
  member = shared.agent;
  outsider = await app.signedIn('experimentalist');
  manager = await app.signedIn('manager');
  administrator = await app.signedIn('administrator');
  const campaignId = await openCampaign(app, 'Calcium week', [mine.account, shared.account]);
  await fileCase(owner, { title: 'Secret calcium plan', tags: ['zircon'], campaignId });
  await fileCase(owner, { title: 'Gold, of the owner alone' });
  for (let n = 1; n <= 10; n += 1) await fileCase(owner, { title: `Survey ${n}` });
  const { yukawaDocument } = await import('../documents/sample-documents.ts');
  const document = {
    ...yukawaDocument,
    projectile: { species: 'neutron' },
    target: calcium,
    energy: { value: 25, unit: 'meV' },
  };
  await fileCase(owner, { title: 'Neutrons on a nucleus', document });
});
afterAll(() => app.close());

const ask = async (who: Agent, q: string): Promise<SearchAnswer> =>
  searchSchema.parse((await who.get('/api/search').query({ q }).expect(200)).body);
const group = ({ groups }: SearchAnswer, kind: SearchKind) =>
  groups.find((found) => found.kind === kind);
const labels = (answer: SearchAnswer, kind: SearchKind) =>
  group(answer, kind)?.hits.map(({ label }) => label) ?? [];

describe('GET /api/search', () => {
  it.each(['Ca-40', '40Ca', 'calcium 40', 'ca40', '⁴⁰Ca'])('finds the nuclide as %s', async (q) => {
    const answer = await ask(outsider, q);
    expect(answer.groups[0]?.kind).toBe('nuclides');
    expect(answer.groups[0]?.hits[0]?.key).toBe('Ca-40');
  });

  it.each([
    ['woods', 'forms', 'woodsSaxon'],
    ['rutherford', 'forms', 'coulomb'],
    ['graphite', 'materials', 'graphite'],
    ['alpha', 'species', 'alpha'],
    ['nickel', 'elements', 'Ni'],
  ] as const)('%s leads to %s', async (q, kind, key) => {
    const [first] = (await ask(outsider, q)).groups;
    expect(first?.kind).toBe(kind);
    expect(first?.hits[0]?.key).toBe(key);
  });

  it('finds a case by title, number, tag and station, for who may read it', async () => {
    for (const who of [owner, member, manager]) {
      expect(labels(await ask(who, 'secret calcium'), 'cases')).toEqual(['Secret calcium plan']);
    }
    expect(labels(await ask(owner, 'zircon'), 'cases')).toEqual(['Secret calcium plan']);
    expect(labels(await ask(owner, '#2'), 'cases')).toEqual(['Gold, of the owner alone']);
    expect(labels(await ask(owner, 'Ca-40'), 'cases')).toEqual(['Neutrons on a nucleus']);
    expect(labels(await ask(member, 'gold'), 'cases')).toEqual([]);
  });

  it('neither shows nor counts the cases of others', async () => {
    for (const who of [outsider, administrator]) {
      for (const q of [
        'secret',
        'calcium',
        'zircon',
        'survey',
        '#1',
        '1',
        'Calcium week',
        'yukawa',
      ]) {
        expect(group(await ask(who, q), 'cases'), q).toBeUndefined();
      }
    }
    expect(JSON.stringify(await ask(outsider, 'secret'))).not.toContain('plan');
  });

  it('shows at most a handful of a group and counts the rest', async () => {
    const survey = group(await ask(owner, 'survey'), 'cases');
    expect(survey?.hits).toHaveLength(HITS_PER_GROUP);
    expect(survey?.total).toBe(10);
    const tin = group(await ask(owner, 'tin'), 'nuclides');
    expect(tin?.hits).toHaveLength(HITS_PER_GROUP);
    expect(tin?.total ?? 0).toBeGreaterThan(HITS_PER_GROUP);
    // The most abundant isotope of tin stands first.
    expect(tin?.hits[0]?.key).toBe('Sn-120');
  });

  it('a case named so goes before a table that only mentions it', async () => {
    expect((await ask(owner, 'Gold, of the owner alone')).groups[0]?.kind).toBe('cases');
    expect((await ask(owner, 'gold')).groups[0]?.kind).not.toBe('forms');
  });

  it.each(['', '   ', '%', '_', "'; drop table cases; --", '💥', '('])(
    'answers %j without a fault',
    async (q) => {
      const answer = await ask(owner, q);
      expect(answer.groups.every(({ total }) => total > 0)).toBe(true);
    },
  );

  it('refuses a search that is too long or missing, and whoever is not signed in', async () => {
    await owner
      .get('/api/search')
      .query({ q: 'a'.repeat(201) })
      .expect(422);
    await owner.get('/api/search').expect(422);
    await app.anonymous().get('/api/search?q=gold').expect(401);
  });
});
