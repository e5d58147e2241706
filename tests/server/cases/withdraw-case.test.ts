import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { query } from '#tests/support/test-database.ts';
import { fileCase, read, save } from './case-requests.ts';

let app: TestApp;
let agent: Agent;

beforeAll(async () => {
  app = await createTestApp();
  ({ agent } = await app.person('theorist'));
});
afterAll(() => app.close());

const withdraw = (id: string, reason: unknown = 'Superseded by another plan.') =>
  agent.post(`/api/cases/${id}/withdraw`).send({ reason });

/** Gives the newest version a status that no route of this version gives. */
async function setStatus(id: string, status: string): Promise<void> {
  await query(
    app.database.runtimeUrl,
    `insert into version_statuses (version_id, status, actor_id, reason, created_at)
     select v.id, $2, c.owner_id, '', now() from cases c
     join case_versions v on v.case_id = c.id and v.n = c.newest_version where c.id = $1`,
    [id, status],
  );
}

describe('POST /api/cases/:id/withdraw', () => {
  it('withdraws a draft with its reason, on the record', async () => {
    const { filed, etag } = await fileCase(agent);
    const answer = await withdraw(filed.id).expect(200);
    expect(answer.body).toMatchObject({ status: 'withdrawn', version: { n: 1 } });
    expect(answer.headers['etag']).not.toBe(etag);
    const rows = await query(
      app.database.ownerUrl,
      `select before->>'status' as before, after->>'reason' as reason from trail
       where subject_id = $1 and action = 'case.withdraw'`,
      [filed.id],
    );
    expect(rows).toEqual([{ before: 'draft', reason: 'Superseded by another plan.' }]);
    expect((await withdraw(filed.id).expect(409)).body).toMatchObject({ code: 'conflict' });
    expect((await agent.get(`/api/cases/${filed.id}`).expect(200)).body).toMatchObject({
      status: 'withdrawn',
    });
  });

  it('makes a save that started before it stale, and lets a new version follow', async () => {
    const { filed, etag } = await fileCase(agent);
    const after = (await withdraw(filed.id).expect(200)).headers['etag'] ?? '';
    await save(agent, filed.id, etag).expect(412);
    expect((await save(agent, filed.id, after).expect(201)).body).toMatchObject({
      status: 'draft',
      version: { n: 2 },
    });
    expect(await read(agent, `/api/cases/${filed.id}/versions`)).toMatchObject({
      items: [{ status: 'draft' }, { n: 1, status: 'withdrawn' }],
    });
  });

  it('takes a version in review, but none that was decided', async () => {
    const { filed } = await fileCase(agent);
    await setStatus(filed.id, 'inReview');
    await withdraw(filed.id).expect(200);
    for (const status of ['approved', 'released', 'superseded']) {
      const decided = await fileCase(agent);
      await setStatus(decided.filed.id, status);
      await withdraw(decided.filed.id).expect(409);
    }
  });

  it('shows which version was released', async () => {
    const { filed, etag } = await fileCase(agent);
    await setStatus(filed.id, 'released');
    await save(agent, filed.id, etag).expect(201);
    expect((await agent.get(`/api/cases/${filed.id}`).expect(200)).body).toMatchObject({
      releasedVersion: 1,
      status: 'draft',
    });
  });

  it('asks for a reason', async () => {
    const { filed } = await fileCase(agent);
    for (const reason of ['', '   ', undefined, 5]) {
      const refused = await withdraw(filed.id, reason ?? null).expect(422);
      expect(refused.body).toMatchObject({ errors: [{ path: '/reason' }] });
    }
    await agent.post(`/api/cases/${filed.id}/withdraw`).expect(400);
  });

  it('honours If-Match where it is sent', async () => {
    const { filed, etag } = await fileCase(agent);
    await save(agent, filed.id, etag).expect(201);
    await withdraw(filed.id).set('If-Match', etag).expect(412);
    await withdraw(filed.id).set('If-Match', '"2"').expect(200);
  });
});
