import { createCampaign } from '#server/modules/campaigns/create-campaign.ts';
import { actorOf } from '#server/modules/users/find-account.ts';
import type { Account } from '#server/modules/users/account.entity.ts';
import { caseSchema } from '#shared/contracts/cases.ts';
import type { Case } from '#shared/contracts/cases.ts';
import { makeAccount } from '#tests/support/factories.ts';
import type { Agent, TestApp } from '#tests/support/test-app.ts';
import { yukawaDocument } from '../documents/sample-documents.ts';

export const body = { title: 'Yukawa well', tags: ['electrons'], document: yukawaDocument };

/** The same document at another energy, so that versions differ. */
export function atEnergy(eV: number): typeof yukawaDocument {
  return { ...yukawaDocument, energy: { value: eV, unit: 'eV' } };
}

/** Files a case and answers it with its tag. */
export async function fileCase(
  agent: Agent,
  changes: object = {},
): Promise<{ filed: Case; etag: string }> {
  const answer = await agent
    .post('/api/cases')
    .send({ ...body, ...changes })
    .expect(201);
  return { filed: caseSchema.parse(answer.body), etag: answer.headers['etag'] ?? '' };
}

/** A save on top of `etag`; what is answered is for the caller to judge. */
export function save(agent: Agent, id: string, etag: string, changes: object = {}) {
  return agent
    .post(`/api/cases/${id}/versions`)
    .set('If-Match', etag)
    .send({ document: atEnergy(200), ...changes });
}

/** A campaign opened by a lab manager of its own. */
export async function openCampaign(
  app: TestApp,
  name: string,
  members: readonly Account[],
): Promise<string> {
  const manager = await makeAccount(app.em(), { role: 'manager' });
  const actor = actorOf(manager, { kind: 'session', sessionId: 'none' });
  const memberIds = members.map(({ id }) => id);
  const context = { em: app.em(), actor, now: new Date() };
  return (await createCampaign(context, { name, memberIds })).id;
}

/** The body of a GET that must succeed. */
export async function read<T>(agent: Agent, path: string): Promise<T> {
  return (await agent.get(path).expect(200)).body as T;
}
