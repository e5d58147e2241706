import { randomUUID } from 'node:crypto';
import type { Account } from '#server/modules/users/account.entity.ts';
import { query } from '#tests/support/test-database.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { ALLOWED_TO_ALL } from '#tests/support/walk-routes.ts';
import type { Rule, Standing } from '#tests/support/walk-routes.ts';
import { atEnergy, body, fileCase, openCampaign } from '../cases/case-requests.ts';
import { yukawaDocument } from '../documents/sample-documents.ts';

const RESEARCHERS_ONLY: Rule['expect'] = { ...ALLOWED_TO_ALL, administrator: 'forbidden' };

const HIDDEN = { owner: 'hidden', member: 'hidden', outsider: 'hidden' } as const;
const INVOLVED = { owner: 'allowed', member: 'allowed', outsider: 'hidden' } as const;
const OWN = { owner: 'allowed', member: 'forbidden', outsider: 'hidden' } as const;
const OWN_OF_ALL = { owner: 'allowed', member: 'forbidden', outsider: 'forbidden' } as const;

const READ: Rule['expect'] = {
  experimentalist: INVOLVED,
  theorist: INVOLVED,
  manager: 'allowed',
  administrator: HIDDEN,
};

const filers = new WeakMap<TestApp, ReturnType<TestApp['person']>>();

function filerOf(app: TestApp): ReturnType<TestApp['person']> {
  const filer = filers.get(app) ?? app.person('experimentalist');
  filers.set(app, filer);
  return filer;
}

/** A case someone else filed, given to the person or to a campaign of theirs; roles that file none can own one so. */
async function caseOf(app: TestApp, person: Account, standing: Standing) {
  const filer = await filerOf(app);
  const members = standing === 'member' ? [filer.account, person] : [filer.account];
  const campaignId = await openCampaign(app, `Of ${randomUUID()}`, members);
  const { filed, etag } = await fileCase(filer.agent, { campaignId });
  if (standing === 'owner') {
    const values = [person.id, filed.id];
    await query(app.database.ownerUrl, 'update cases set owner_id = $1 where id = $2', values);
  }
  return { params: { id: filed.id, n: '1' }, headers: { 'If-Match': etag } };
}

/** Campaigns, cases, estimates and forms. */
export const RULES: Record<string, Rule> = {
  listCampaigns: { access: 'campaign.list', expect: ALLOWED_TO_ALL },
  listForms: { access: 'reference.read', expect: ALLOWED_TO_ALL },
  computeEstimate: {
    access: 'estimate.compute',
    expect: ALLOWED_TO_ALL,
    prepare: () => ({ body: yukawaDocument }),
  },
  computeMaterialAids: {
    access: 'estimate.compute',
    expect: ALLOWED_TO_ALL,
    prepare: () => ({ body: { estimate: yukawaDocument, material: { key: 'gold' } } }),
  },
  computeRunPlan: {
    access: 'estimate.compute',
    expect: ALLOWED_TO_ALL,
    prepare: () => ({
      body: {
        estimate: yukawaDocument,
        beam: { particlesPerSecond: 1000 },
        foil: { arealDensity: { value: 1e18, unit: '1/cm2' } },
        detectors: [{ name: 'D1', angle: 30, solidAngle: 0.01 }],
      },
    }),
  },
  listCases: { access: 'case.list', expect: RESEARCHERS_ONLY },
  createCase: { access: 'case.create', expect: RESEARCHERS_ONLY, prepare: () => ({ body }) },
  readCase: { access: 'case.read', expect: READ, prepare: caseOf },
  listVersions: { access: 'case.read', expect: READ, prepare: caseOf },
  readVersion: { access: 'case.read', expect: READ, prepare: caseOf },
  saveVersion: {
    access: 'case.write',
    expect: {
      experimentalist: INVOLVED,
      theorist: INVOLVED,
      manager: OWN_OF_ALL,
      administrator: HIDDEN,
    },
    prepare: async (app, person, standing) => ({
      ...(await caseOf(app, person, standing)),
      body: { document: atEnergy(150) },
    }),
  },
  withdrawCase: {
    access: 'case.withdraw',
    expect: { experimentalist: OWN, theorist: OWN, manager: OWN_OF_ALL, administrator: HIDDEN },
    prepare: async (app, person, standing) => ({
      ...(await caseOf(app, person, standing)),
      body: { reason: 'To see who may.' },
    }),
  },
};
