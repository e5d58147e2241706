import { randomUUID } from 'node:crypto';
import type { Account } from '#server/modules/users/account.entity.ts';
import { makeAccount } from '#tests/support/factories.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { ALLOWED_TO_ALL } from '#tests/support/walk-routes.ts';
import type { Rule, Standing } from '#tests/support/walk-routes.ts';
import { openCampaign } from '../cases/case-requests.ts';
import { makeJob } from '../jobs/make-job.ts';
import { energyScan } from '../jobs/scan-requests.ts';

const RESEARCHERS_ONLY: Rule['expect'] = { ...ALLOWED_TO_ALL, administrator: 'forbidden' };
const HIDDEN = { owner: 'hidden', member: 'hidden', outsider: 'hidden' } as const;
const INVOLVED = { owner: 'allowed', member: 'allowed', outsider: 'hidden' } as const;
const OWN = { owner: 'allowed', member: 'forbidden', outsider: 'hidden' } as const;

const READ: Rule['expect'] = {
  experimentalist: INVOLVED,
  theorist: INVOLVED,
  manager: 'allowed',
  administrator: HIDDEN,
};
const STOP: Rule['expect'] = { ...READ, experimentalist: OWN, theorist: OWN };

/** A job that has ended, so that the stream of its events ends too. */
async function jobOf(app: TestApp, person: Account, standing: Standing) {
  const other = await makeAccount(app.em());
  const members = standing === 'member' ? [other, person] : [other];
  const campaignId = await openCampaign(app, `Of ${randomUUID()}`, members);
  const ownerId = standing === 'owner' ? person.id : other.id;
  const { id } = await makeJob(app.em(), { ownerId, campaignId });
  return { params: { id } };
}

/** Jobs and the scans that are jobs. */
export const RULES: Record<string, Rule> = {
  createScan: {
    access: 'scan.create',
    expect: RESEARCHERS_ONLY,
    prepare: () => ({ body: energyScan }),
  },
  readScan: { access: 'job.read', expect: READ, prepare: jobOf },
  readScanResult: { access: 'job.read', expect: READ, prepare: jobOf },
  cancelScan: { access: 'job.cancel', expect: STOP, prepare: jobOf },
  resumeScan: { access: 'job.cancel', expect: STOP, prepare: jobOf },
  listJobs: { access: 'job.list', expect: RESEARCHERS_ONLY },
  readJob: { access: 'job.read', expect: READ, prepare: jobOf },
  watchJob: { access: 'job.read', expect: READ, prepare: jobOf },
  cancelJob: { access: 'job.cancel', expect: STOP, prepare: jobOf },
  resumeJob: { access: 'job.cancel', expect: STOP, prepare: jobOf },
};
