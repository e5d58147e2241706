import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { versionDetailSchema } from '#shared/contracts/cases.ts';
import type { VersionDetail } from '#shared/contracts/cases.ts';
import { canonicalHash } from '#server/documents/canonical-hash.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import type { Account } from '#server/modules/users/account.entity.ts';
import { query } from '#tests/support/test-database.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { yukawaDocument } from '../documents/sample-documents.ts';
import { body, fileCase, openCampaign, read } from './case-requests.ts';

let app: TestApp;
let agent: Agent;
let account: Account;

beforeAll(async () => {
  app = await createTestApp();
  ({ agent, account } = await app.person('experimentalist'));
});
afterAll(() => app.close());

const lastNumber = async (): Promise<unknown> =>
  (await query(app.database.ownerUrl, 'select last from case_numbers'))[0]?.['last'];

describe('POST /api/cases', () => {
  it('answers as the contract says and keeps what was computed', async () => {
    const answer = await agent
      .post('/api/cases')
      .send({ ...body, note: 'first' })
      .expect(201);
    expect(answer.headers['etag']).toBe('"1"');
    expect(answer.body).toMatchObject({
      number: 1,
      title: 'Yukawa well',
      status: 'draft',
      releasedVersion: null,
      tags: ['electrons'],
      owner: { id: account.id, name: account.name },
      campaign: null,
      version: { n: 1, author: { id: account.id }, note: 'first', status: 'draft' },
    });
    const { id } = answer.body as { id: string };
    const version = versionDetailSchema.parse(
      (await agent.get(`/api/cases/${id}/versions/1`).expect(200)).body,
    );
    expect(version.document).toEqual({ ...yukawaDocument, format: 1 });
    expect(version.engine).toEqual({ name: 'tallybarn', version: app.config.version });
    // From the contract, whose numbers were computed independently of this program.
    const born1 = version.result.estimate.methods.born1;
    if (!born1 || 'unavailable' in born1 || 'divergent' in born1.elastic) {
      throw new Error('born1 must be computed.');
    }
    expectRelative(born1.elastic.value, 0.816789, 1e-7);
    expectRelative(version.result.estimate.kinematics.k.value, 5.12316722, 1e-8);
  });

  it('is the same result as POST /api/estimates gives, warnings included', async () => {
    const estimated = await agent.post('/api/estimates').send(yukawaDocument).expect(200);
    const { filed } = await fileCase(agent);
    const version = await read<VersionDetail>(agent, `/api/cases/${filed.id}/versions/1`);
    expect(version.result).toEqual({ estimate: estimated.body as object });
  });

  it('seals with a hash that anyone can recompute from the answer', async () => {
    const { filed } = await fileCase(agent);
    const { document, result, engine, hash } = await read<VersionDetail>(
      agent,
      `/api/cases/${filed.id}/versions/1`,
    );
    expect(hash).toBe(canonicalHash({ document, result, engine }));
    expect(filed.version.hash).toBe(hash);
    const again = await fileCase(agent, { title: 'Another title, same physics' });
    expect(again.filed.version.hash).toBe(hash);
  });

  it('writes the trail in the same transaction', async () => {
    const { filed } = await fileCase(agent, { title: 'Trailed' });
    const rows = await query(
      app.database.ownerUrl,
      'select action, actor_id, actor_name, before, after from trail where subject_id = $1',
      [filed.id],
    );
    expect(rows).toEqual([
      {
        action: 'case.create',
        actor_id: account.id,
        actor_name: account.name,
        before: null,
        after: {
          number: filed.number,
          n: 1,
          hash: filed.version.hash,
          title: 'Trailed',
          tags: ['electrons'],
          campaignId: null,
        },
      },
    ]);
  });

  it('files under a campaign of one’s own and refuses others in words', async () => {
    const mine = await openCampaign(app, 'Mine', [account]);
    const foreign = await openCampaign(app, 'Foreign', []);
    const { filed } = await fileCase(agent, { campaignId: mine });
    expect(filed.campaign).toEqual({ id: mine, name: 'Mine' });
    for (const campaignId of [foreign, crypto.randomUUID()]) {
      const refused = await agent
        .post('/api/cases')
        .send({ ...body, campaignId })
        .expect(422);
      expect(refused.body).toMatchObject({ errors: [{ path: '/campaignId' }] });
    }
    expect((await fileCase(agent, { campaignId: null })).filed.campaign).toBeNull();
  });

  it('refuses what cannot be computed with pointers below /document', async () => {
    const before = await lastNumber();
    const terms = [{ form: 'noSuchForm', V0: { value: 1, unit: 'eV' } }];
    const refused = await agent
      .post('/api/cases')
      .send({ ...body, document: { ...yukawaDocument, interaction: { terms } } })
      .expect(422);
    expect(refused.type).toBe('application/problem+json');
    expect(refused.body).toMatchObject({
      code: 'invalidInput',
      errors: [{ path: '/document/interaction/terms/0/form' }],
    });
    expect(await lastNumber()).toBe(before);
  });

  it.each([
    ['a run plan without a beam', { runPlan: { detectors: [] } }, '/document/runPlan/beam'],
    ['a format of the future', { format: 2 }, '/document/format'],
    ['an unknown key', { potentials: [] }, '/document/potentials'],
    ['a wrong unit', { energy: { value: 1, unit: 'angstrom' } }, '/document/energy/unit'],
    ['a negative energy', { energy: { value: -1, unit: 'eV' } }, '/document/energy'],
    ['a number as text', { energy: { value: '1', unit: 'eV' } }, '/document/energy/value'],
    ['no method', { methods: [] }, '/document/methods'],
    [
      'a NUL in what was typed',
      { entered: { '/energy': 'a\u0000' } },
      '/document/entered/~1energy',
    ],
  ])('refuses %s', async (_what, changes, path) => {
    const refused = await agent
      .post('/api/cases')
      .send({ ...body, document: { ...yukawaDocument, ...changes } })
      .expect(422);
    const { errors } = refused.body as { errors: { path: string; message: string }[] };
    expect(errors.map((error) => error.path)).toContain(path);
    expect(errors.every(({ message }) => message.length > 10)).toBe(true);
  });

  it.each([
    ['title', { title: '   ' }, '/title'],
    ['title', { title: 'x'.repeat(201) }, '/title'],
    ['tag', { tags: ['fine', ''] }, '/tags/1'],
    ['tags', { tags: Array.from({ length: 21 }, (_, index) => `t${index}`) }, '/tags'],
    ['campaign', { campaignId: '42' }, '/campaignId'],
    ['unknown member', { owner: 'me' }, '/owner'],
  ])('refuses a bad %s', async (_what, changes, path) => {
    const refused = await agent
      .post('/api/cases')
      .send({ ...body, ...changes })
      .expect(422);
    expect(refused.body).toMatchObject({ errors: [{ path }] });
  });

  it('refuses 1e400, an empty body, no JSON and 10 million angles, and answers on', async () => {
    const text = JSON.stringify(body).replace('"value":100', '"value":1e400');
    const post = () => agent.post('/api/cases').set('Content-Type', 'application/json');
    expect((await post().send(text).expect(422)).body).toMatchObject({
      errors: [{ path: '/document/energy/value' }],
    });
    await post().send('').expect(400);
    await post().send('{"title":').expect(400);
    await agent.post('/api/cases').type('form').send('title=x').expect(415);
    const angles = { unit: 'deg', from: 0, to: 180, count: 1e7 };
    const many = { ...body, document: { ...yukawaDocument, angles } };
    expect((await agent.post('/api/cases').send(many).expect(422)).body).toMatchObject({
      errors: [{ path: '/document/angles/count' }],
    });
    const sent = `{"title":"x","document":{"angles":{"values":[${'1,'.repeat(6e5)}1]}}}`;
    await post().send(sent).expect(413);
    await agent.get('/api/cases').expect(200);
  });

  it('keeps a document of 5,000 angles whole', async () => {
    const angles = { unit: 'deg', from: 0, to: 180, count: 5000 };
    const { filed } = await fileCase(agent, { document: { ...yukawaDocument, angles } });
    const { document, result, engine, hash } = await read<VersionDetail>(
      agent,
      `/api/cases/${filed.id}/versions/1`,
    );
    expect(hash).toBe(canonicalHash({ document, result, engine }));
    expect(result.estimate.methods.born1).toMatchObject({
      differential: { length: 5000, 4999: { theta: 180 } },
    });
  });

  it('counts from 1 without gaps, also when many file at once and some fail', async () => {
    const first = Number(await lastNumber());
    const sent = Array.from({ length: 12 }, (_, index) =>
      agent
        .post('/api/cases')
        .send(index % 3 === 2 ? { ...body, campaignId: crypto.randomUUID() } : body),
    );
    const answers = await Promise.all(sent);
    const numbers = answers
      .filter(({ status }) => status === 201)
      .map((answer) => (answer.body as { number: number }).number)
      .sort((a, b) => a - b);
    expect(numbers).toEqual(Array.from({ length: 8 }, (_, index) => first + 1 + index));
  });

  it('does not burn a number when the database refuses the row', async () => {
    const before = await lastNumber();
    await query(
      app.database.ownerUrl,
      'alter table case_versions add constraint broken check (n > 1) not valid',
    );
    await agent.post('/api/cases').send(body).expect(500);
    await query(app.database.ownerUrl, 'alter table case_versions drop constraint broken');
    expect(await lastNumber()).toBe(before);
    expect((await fileCase(agent)).filed.number).toBe(Number(before) + 1);
  });
});

describe('Idempotency-Key', () => {
  const send = (key: string, changes: object = {}) =>
    agent
      .post('/api/cases')
      .set('Idempotency-Key', key)
      .send({ ...body, ...changes });

  it('makes a retry the same save, in turn and at once', async () => {
    const key = crypto.randomUUID();
    const first = await send(key).expect(201);
    const second = await send(key).expect(201);
    expect(second.body).toEqual(first.body);
    expect(second.headers['etag']).toBe(first.headers['etag']);
    const other = crypto.randomUUID();
    const answers = await Promise.all([send(other), send(other), send(other)]);
    expect(answers.map(({ status }) => status)).toEqual([201, 201, 201]);
    expect(new Set(answers.map((answer) => (answer.body as { id: string }).id)).size).toBe(1);
  });

  it('refuses the same key for something else, and what is no UUID', async () => {
    const key = crypto.randomUUID();
    await send(key).expect(201);
    expect((await send(key, { title: 'Other' }).expect(409)).body).toMatchObject({
      code: 'conflict',
    });
    await send('again').expect(400);
  });

  it('belongs to one person: the same key of another saves', async () => {
    const key = crypto.randomUUID();
    const mine = (await send(key).expect(201)).body as { id: string };
    const other = await app.person('theorist');
    const theirs = await other.agent
      .post('/api/cases')
      .set('Idempotency-Key', key)
      .send(body)
      .expect(201);
    expect((theirs.body as { id: string }).id).not.toBe(mine.id);
  });

  it('is forgotten with a save that failed, so that the mended one goes through', async () => {
    const key = crypto.randomUUID();
    await send(key, { title: '' }).expect(422);
    await send(key).expect(201);
  });
});
