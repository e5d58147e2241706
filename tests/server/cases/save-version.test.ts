import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { canonicalHash } from '#server/documents/canonical-hash.ts';
import { versionDetailSchema } from '#shared/contracts/cases.ts';
import type { Case, CaseDetail, VersionDetail } from '#shared/contracts/cases.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { query } from '#tests/support/test-database.ts';
import { atEnergy, fileCase, openCampaign, read, save } from './case-requests.ts';

let app: TestApp;
let agent: Agent;

beforeAll(async () => {
  app = await createTestApp();
  ({ agent } = await app.person('experimentalist'));
});
afterAll(() => app.close());

describe('POST /api/cases/:id/versions', () => {
  it('appends a version, moves the case to it and keeps the old one as it was', async () => {
    const { filed, etag } = await fileCase(agent);
    const old = (await agent.get(`/api/cases/${filed.id}/versions/1`).expect(200)).body as object;
    const answer = await save(agent, filed.id, etag, { note: 'doubled the energy' }).expect(201);
    expect(answer.headers['etag']).toBe('"2"');
    expect(answer.body).toMatchObject({
      id: filed.id,
      number: filed.number,
      title: filed.title,
      tags: filed.tags,
      status: 'draft',
      version: { n: 2, note: 'doubled the energy' },
    });
    const now = await agent.get(`/api/cases/${filed.id}`).expect(200);
    expect(now.headers['etag']).toBe('"2"');
    expect(now.body).toMatchObject({ document: { ...atEnergy(200), format: 1 }, mayEdit: true });
    expect((await agent.get(`/api/cases/${filed.id}/versions/1`).expect(200)).body).toEqual(old);
    const { hash, note } = await read<VersionDetail>(agent, `/api/cases/${filed.id}/versions/2`);
    expect(note).toBe('doubled the energy');
    expect(hash).not.toBe(filed.version.hash);
  });

  it('changes title and tags from this version on', async () => {
    const { filed, etag } = await fileCase(agent);
    const changes = { title: 'New name', tags: ['renamed'] };
    await save(agent, filed.id, etag, changes).expect(201);
    expect((await agent.get(`/api/cases/${filed.id}`).expect(200)).body).toMatchObject(changes);
    const versions = await Promise.all(
      [1, 2].map((n) => agent.get(`/api/cases/${filed.id}/versions/${n}`).expect(200)),
    );
    expect(versions.map(({ body }) => (body as VersionDetail).title)).toEqual([
      'Yukawa well',
      'New name',
    ]);
  });

  it('asks for If-Match (428) and refuses a stale one (412), naming the newest; nothing is lost', async () => {
    const { filed, etag } = await fileCase(agent);
    const bare = agent.post(`/api/cases/${filed.id}/versions`).send({ document: atEnergy(300) });
    expect((await bare.expect(428)).body).toMatchObject({ code: 'preconditionRequired' });
    await save(agent, filed.id, '3').expect(400);
    await save(agent, filed.id, etag).expect(201);
    const stale = await save(agent, filed.id, etag, { document: atEnergy(300) }).expect(412);
    expect(stale.body).toMatchObject({
      code: 'staleVersion',
      currentVersion: 2,
      currentEtag: '"2"',
    });
    const now = (await agent.get(`/api/cases/${filed.id}`).expect(200)).body as CaseDetail;
    expect(now.version.n).toBe(2);
    expect(now.document.energy.value).toBe(200);
    await save(agent, filed.id, '"2"', { document: atEnergy(300) }).expect(201);
  });

  it('lets exactly one of several saves at once win', async () => {
    const { filed, etag } = await fileCase(agent);
    const answers = await Promise.all(
      [210, 220, 230, 240].map((eV) => save(agent, filed.id, etag, { document: atEnergy(eV) })),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 412, 412, 412]);
    const winner = answers.find(({ status }) => status === 201)?.body as Case;
    expect(await read(agent, `/api/cases/${filed.id}/versions`)).toMatchObject({
      total: 2,
      items: [{ n: 2, hash: winner.version.hash }, { n: 1 }],
    });
  });

  it('makes a retry after a lost answer the same save, although its tag is stale by then', async () => {
    const { filed, etag } = await fileCase(agent);
    const key = crypto.randomUUID();
    const send = (changes: object = {}) =>
      save(agent, filed.id, etag, changes).set('Idempotency-Key', key);
    const first = await send().expect(201);
    await save(agent, filed.id, '"2"', { document: atEnergy(250) }).expect(201);
    const again = await send().expect(201);
    expect(again.body).toEqual(first.body);
    expect(again.headers['etag']).toBe('"2"');
    await send({ note: 'something else' }).expect(409);
    const other = crypto.randomUUID();
    const both = await Promise.all(
      [1, 2].map(() => save(agent, filed.id, '"3"').set('Idempotency-Key', other)),
    );
    expect(both.map(({ status }) => status)).toEqual([201, 201]);
    expect((await agent.get(`/api/cases/${filed.id}/versions`).expect(200)).body).toMatchObject({
      total: 4,
    });
  });

  it('points below /document at what cannot be computed and saves nothing', async () => {
    const { filed, etag } = await fileCase(agent);
    const refused = await save(agent, filed.id, etag, {
      document: { ...atEnergy(100), angles: { unit: 'deg', values: [0, 181] } },
    }).expect(422);
    const { errors } = refused.body as { errors: { path: string }[] };
    expect(errors.map(({ path }) => path)).toEqual(['/document/angles/values/1']);
    await save(agent, filed.id, etag).expect(201);
  });

  it('keeps a run plan with the answer to it, and points below /document/runPlan at what is wrong with one', async () => {
    const { filed, etag } = await fileCase(agent);
    const beam = { particlesPerSecond: 1e9 };
    const foil = { arealDensity: { value: 1e15, unit: '1/cm2' } };
    const detector = { name: 'D1', angle: 30, solidAngle: 1e-3 };
    const planned = (changes: object) => ({
      document: { ...atEnergy(100), runPlan: { beam, foil, detectors: [detector], ...changes } },
    });
    const faults = async (changes: object) =>
      (await save(agent, filed.id, etag, planned(changes)).expect(422)).body as {
        errors: { path: string }[];
      };
    const wide = [{ ...detector, solidAngle: 13 }];
    expect((await faults({ detectors: wide })).errors).toMatchObject([
      { path: '/document/runPlan/detectors/0/solidAngle' },
    ]);
    const electric = { current: { value: 1, unit: 'nA' } };
    expect((await faults({ beam: electric })).errors).toMatchObject([
      { path: expect.stringMatching(/^\/document\/runPlan\/beam/) as unknown },
    ]);
    await save(agent, filed.id, etag, planned({})).expect(201);
    const answer = await agent.get(`/api/cases/${filed.id}/versions/2`).expect(200);
    const version = versionDetailSchema.parse(answer.body);
    expect(version.document.runPlan).toEqual({ beam, foil, detectors: [detector] });
    expect(version.result.runPlan?.detectors[0]).toMatchObject({ name: 'D1', solidAngle: 1e-3 });
    const alone = { ...planned({}).document.runPlan, estimate: atEnergy(100) };
    const direct = await agent.post('/api/run-plans').send(alone).expect(200);
    expect(version.result.runPlan).toEqual(direct.body);
    expect(version.hash).toBe(canonicalHash(version));
  });

  it('tells the trail who saved what over what', async () => {
    const { filed, etag } = await fileCase(agent);
    const saved = (await save(agent, filed.id, etag).expect(201)).body as Case;
    const rows = await query(
      app.database.ownerUrl,
      `select before, after->>'hash' as hash from trail
       where subject_id = $1 and action = 'case.saveVersion'`,
      [filed.id],
    );
    expect(rows).toEqual([
      { before: { n: 1, hash: filed.version.hash }, hash: saved.version.hash },
    ]);
  });

  it('is written by another member of the campaign under their own name', async () => {
    const owner = await app.person('experimentalist');
    const member = await app.person('theorist');
    const campaignId = await openCampaign(app, 'Shared', [owner.account, member.account]);
    const { filed, etag } = await fileCase(owner.agent, { campaignId });
    const saved = await save(member.agent, filed.id, etag).expect(201);
    expect(saved.body).toMatchObject({
      owner: { id: owner.account.id },
      version: { author: { id: member.account.id, name: member.account.name } },
    });
  });
});

describe('GET /api/cases/:id/versions', () => {
  it('pages heads newest first and knows no version beyond', async () => {
    const { filed, etag } = await fileCase(agent);
    await save(agent, filed.id, etag).expect(201);
    await save(agent, filed.id, '"2"', { document: atEnergy(5) }).expect(201);
    const page = await agent.get(`/api/cases/${filed.id}/versions?page=2&pageSize=2`).expect(200);
    expect(page.body).toMatchObject({ items: [{ n: 1, status: 'draft' }], total: 3, page: 2 });
    for (const n of ['4', '0', '-1', '1.5', 'one', '1e99']) {
      await agent.get(`/api/cases/${filed.id}/versions/${n}`).expect(404);
    }
  });
});
