import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { CaseDetail } from '#shared/contracts/cases.ts';
import type { CitingCase, InteractionDetail } from '#shared/contracts/library.ts';
import type { Problem } from '#shared/contracts/problem-details.ts';
import type { Account } from '#server/modules/users/account.entity.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { fileCase, openCampaign, read, save } from '../cases/case-requests.ts';
import { yukawaDocument } from '../documents/sample-documents.ts';
import { addVersion, citing, publish, yukawaTerms } from './library-requests.ts';

let app: TestApp;
let theorist: Agent;
let account: Account;
let agent: Agent;
let interaction: InteractionDetail;

beforeAll(async () => {
  app = await createTestApp();
  theorist = await app.signedIn('theorist');
  ({ account, agent } = await app.person('experimentalist'));
  const { published, etag } = await publish(theorist);
  await addVersion(theorist, published, etag).expect(201);
  interaction = published;
});
afterAll(() => app.close());

async function refusal(document: object): Promise<Problem> {
  const answer = await agent.post('/api/cases').send({ title: 'Cites', document }).expect(422);
  return answer.body as Problem;
}

describe('a case that cites an interaction', () => {
  it('keeps the citation, whose terms are those of the cited version, old or new', async () => {
    const old = await fileCase(agent, { document: citing(interaction, 1) });
    const detail = await read<CaseDetail>(agent, `/api/cases/${old.filed.id}`);
    expect(detail.document.interaction.citation).toEqual({ id: interaction.id, version: 1 });
    const newer = citing({ ...interaction, terms: yukawaTerms(-12) }, 2);
    await save(agent, old.filed.id, old.etag, { document: newer }).expect(201);
  });

  it('computes the same with and without it', async () => {
    const [cited, bare] = await Promise.all(
      [citing(interaction, 1), yukawaDocument].map((body) =>
        agent.post('/api/estimates').send(body).expect(200),
      ),
    );
    expect(cited?.body).toEqual(bare?.body);
    const unknown = { ...interaction, id: randomUUID() };
    await agent.post('/api/estimates').send(citing(unknown, 7)).expect(200);
  });

  it('is refused where the terms differ, with the pointer and the mend', async () => {
    const changed = citing({ ...interaction, terms: yukawaTerms(-10.5) }, 1);
    const { code, errors } = await refusal(changed);
    expect(code).toBe('invalidInput');
    expect(errors).toEqual([
      {
        path: '/document/interaction/citation',
        message: `The terms differ from version 1 of “${interaction.name}”; leave the citation out, or take the version again.`,
      },
    ]);
    const { filed, etag } = await fileCase(agent, { document: citing(interaction, 1) });
    await save(agent, filed.id, etag, { document: changed }).expect(422);
    const without = { ...changed, interaction: { terms: changed.interaction.terms } };
    await save(agent, filed.id, etag, { document: without }).expect(201);
  });

  it('is refused where the terms have another order, another unit or one more', async () => {
    const one = { form: 'yukawa', V0: { value: -0.01, unit: 'keV' } };
    const keV = [{ ...one, a: { value: 1, unit: 'angstrom' } }];
    for (const terms of [keV, [...interaction.terms, ...interaction.terms]]) {
      const { errors } = await refusal(citing({ ...interaction, terms }, 1));
      expect(errors?.[0]?.message).toMatch(/differ/);
    }
    const [term] = interaction.terms;
    const turned = [Object.fromEntries(Object.entries(term ?? {}).reverse())];
    const document = { ...citing(interaction, 1), interaction: { terms: turned } };
    const cited = { ...document.interaction, citation: { id: interaction.id, version: 1 } };
    await fileCase(agent, { document: { ...document, interaction: cited } });
  });

  it('is refused where there is no such interaction or version', async () => {
    const nowhere = await refusal(citing({ ...interaction, id: randomUUID() }, 1));
    expect(nowhere.errors?.[0]?.message).toMatch(/no interaction with this identifier/);
    const later = await refusal(citing(interaction, 9));
    expect(later.errors?.[0]?.message).toMatch(/no version 9, its newest is 2/);
    const malformed = await refusal(citing({ ...interaction, id: 'mine' }, 1));
    expect(malformed.errors?.[0]?.path).toBe('/document/interaction/citation/id');
    await refusal(citing(interaction, 0));
  });

  it('may still be saved when the interaction is retired', async () => {
    const { published } = await publish(theorist);
    const { filed, etag } = await fileCase(agent, { document: citing(published, 1) });
    const path = `/api/interactions/${published.id}`;
    await theorist.post(`${path}/retire`).send({ reason: 'Old.' }).expect(200);
    await save(agent, filed.id, etag, { document: citing(published, 1) }).expect(201);
    expect(await read(agent, path)).toMatchObject({ status: 'retired' });
  });
});

describe('GET /api/interactions/:id/cases', () => {
  it('tells everyone of the cases they may read and no other, with the version each cites', async () => {
    const { published } = await publish(theorist);
    const member = await app.person('experimentalist');
    const campaignId = await openCampaign(app, 'Citing', [account, member.account]);
    const shared = await fileCase(agent, { document: citing(published, 1), campaignId });
    const alone = await fileCase(agent, { document: citing(published, 1), title: 'Alone' });
    const path = `/api/interactions/${published.id}/cases`;
    const seen = async (who: Agent) =>
      (await read<{ items: CitingCase[]; total: number }>(who, path)).items.map(({ id }) => id);
    const both = [alone.filed.id, shared.filed.id].sort();
    expect((await seen(agent)).sort()).toEqual(both);
    expect(await seen(member.agent)).toEqual([shared.filed.id]);
    expect((await seen(await app.signedIn('manager'))).sort()).toEqual(both);
    expect(await seen(theorist)).toEqual([]);
    expect(await seen(await app.signedIn('administrator'))).toEqual([]);
    const { items, total } = await read<{ items: CitingCase[]; total: number }>(agent, path);
    expect(total).toBe(2);
    expect(items[0]).toMatchObject({
      title: 'Alone',
      version: 1,
      citedVersion: 1,
      status: 'draft',
    });
  });

  it('forgets a case whose newest version no longer cites it', async () => {
    const { published } = await publish(theorist);
    const { filed, etag } = await fileCase(agent, { document: citing(published, 1) });
    const path = `/api/interactions/${published.id}/cases`;
    expect(await read(agent, path)).toMatchObject({ total: 1 });
    await save(agent, filed.id, etag, { document: yukawaDocument }).expect(201);
    expect(await read(agent, path)).toMatchObject({ total: 0 });
    await agent.get(`/api/interactions/${randomUUID()}/cases`).expect(404);
  });
});
