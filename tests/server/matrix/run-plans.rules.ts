import { randomUUID } from 'node:crypto';
import type { Account } from '#server/modules/users/account.entity.ts';
import { makeAccount } from '#tests/support/factories.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { ALLOWED_TO_ALL } from '#tests/support/walk-routes.ts';
import type { Rule, Standing } from '#tests/support/walk-routes.ts';
import { openCampaign } from '../cases/case-requests.ts';
import { makeJob } from '../jobs/make-job.ts';
import { trialsRequest } from '../run-plans/trials-request.ts';

const INVOLVED = { owner: 'allowed', member: 'allowed', outsider: 'hidden' } as const;

async function runOf(app: TestApp, person: Account, standing: Standing) {
  const other = await makeAccount(app.em());
  const members = standing === 'member' ? [other, person] : [other];
  const campaignId = await openCampaign(app, `Of ${randomUUID()}`, members);
  const ownerId = standing === 'owner' ? person.id : other.id;
  const changes = { ownerId, campaignId, kind: 'runPlanTrials', input: trialsRequest };
  const { id } = await makeJob(app.em(), changes);
  return { params: { id } };
}

/** Monte Carlo runs, which are jobs. */
export const RULES: Record<string, Rule> = {
  createRunPlanTrials: {
    access: 'scan.create',
    expect: { ...ALLOWED_TO_ALL, administrator: 'forbidden' },
    prepare: () => ({ body: trialsRequest }),
  },
  readRunPlanTrials: {
    access: 'job.read',
    expect: {
      experimentalist: INVOLVED,
      theorist: INVOLVED,
      manager: 'allowed',
      administrator: { owner: 'hidden', member: 'hidden', outsider: 'hidden' },
    },
    prepare: runOf,
  },
};
