import { ENGINE } from '#server/compute/engine-kinds.ts';
import type { Compute } from '#server/compute/compute.ts';
import { createCase } from '#server/modules/cases/create-case.ts';
import type { Account } from '#server/modules/users/account.entity.ts';
import { makeAccount } from '#tests/support/factories.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { ALLOWED_TO_ALL } from '#tests/support/walk-routes.ts';
import type { Rule, Standing } from '#tests/support/walk-routes.ts';
import { atEnergy, body, openCampaign } from '../cases/case-requests.ts';

const compute: Compute = (kind, input) => Promise.resolve(ENGINE[kind](input));

/** A case of `person` or of someone else, under a campaign that `person` belongs to or not. */
async function caseFor(app: TestApp, person: Account, standing: Standing): Promise<string> {
  const actor = standing === 'owner' ? person : await makeAccount(app.em());
  const members = standing === 'member' ? [actor, person] : [actor];
  const campaignId = await openCampaign(app, `Of ${actor.id} ${crypto.randomUUID()}`, members);
  const context = { em: app.em(), actor, now: new Date(), compute };
  return (await createCase(context, { ...body, campaignId })).caseId;
}

const RESEARCHERS: Rule['expect'] = { ...ALLOWED_TO_ALL, administrator: 'forbidden' };
const involved = { owner: 'allowed', member: 'allowed', outsider: 'hidden' } as const;
const own = { owner: 'allowed', member: 'forbidden', outsider: 'hidden' } as const;
const managersOwn = { owner: 'allowed', member: 'forbidden', outsider: 'forbidden' } as const;

const reading: Rule = {
  access: 'case.read',
  expect: {
    experimentalist: involved,
    theorist: involved,
    manager: 'allowed',
    administrator: 'hidden',
  },
  prepare: async (...args) => ({ params: { id: await caseFor(...args), n: '1' } }),
};

/** Cases, versions and campaigns. An administrator reads no case, not even one of their own from another role. */
export const RULES: Record<string, Rule> = {
  listCampaigns: { access: 'campaign.list', expect: ALLOWED_TO_ALL },
  listCases: { access: 'case.list', expect: RESEARCHERS },
  createCase: { access: 'case.create', expect: RESEARCHERS, prepare: () => ({ body }) },
  readCase: reading,
  listVersions: reading,
  readVersion: reading,
  saveVersion: {
    access: 'case.write',
    expect: { ...reading.expect, manager: managersOwn },
    prepare: async (...args) => ({
      params: { id: await caseFor(...args) },
      headers: { 'If-Match': '"1"' },
      body: { document: atEnergy(120) },
    }),
  },
  withdrawCase: {
    access: 'case.withdraw',
    expect: { ...reading.expect, experimentalist: own, theorist: own, manager: managersOwn },
    prepare: async (...args) => ({
      params: { id: await caseFor(...args) },
      body: { reason: 'Of the matrix.' },
    }),
  },
};
