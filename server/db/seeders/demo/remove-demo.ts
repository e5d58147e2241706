import type { EntityManager } from '@mikro-orm/postgresql';
import { endSessionsOf } from '#server/modules/auth/end-sessions.ts';
import { CampaignMember } from '#server/modules/campaigns/campaign.entity.ts';
import { revokeTokensOf } from '#server/modules/tokens/revoke-tokens.ts';
import { Account } from '#server/modules/users/account.entity.ts';
import { recordTrail } from '#server/trail/record-trail.ts';

/** No bcrypt hash, so no password matches it. */
export const NO_PASSWORD = '!';

export interface Removed {
  accounts: number;
  cases: number;
}

async function closeAccount(em: EntityManager, account: Account, now: Date): Promise<void> {
  account.active = false;
  account.passwordHash = NO_PASSWORD;
  await endSessionsOf(em, account.id, { reason: 'deactivated', now });
  await revokeTokensOf(em, account.id, now);
  await em.nativeDelete(CampaignMember, { accountId: account.id });
}

/** Campaigns the demo opened and nobody else came to use. */
async function removeIdleCampaigns(em: EntityManager): Promise<void> {
  const idle = `select g.id from campaigns g join accounts a on a.id = g.created_by
    where a.demo and not exists (select from cases c where c.campaign_id = g.id)
    and not exists (select from campaign_members m where m.campaign_id = g.id)`;
  await em.execute(`delete from campaigns where id in (${idle})`);
}

/**
 * Takes the sign-in and the cases of the demo accounts away; their names stay, for the trail and for versions they wrote in
 * cases of others. `em` must be the owner's: versions only grow for the application itself.
 */
export async function removeDemo(em: EntityManager, now: Date): Promise<Removed> {
  return em.transactional(async (tx) => {
    const accounts = await tx.find(Account, { demo: true, active: true });
    for (const account of accounts) await closeAccount(tx, account, now);
    const [row] = await tx.execute<{ cases: number }[]>('select remove_demo_cases() as cases');
    const cases = row?.cases ?? 0;
    // After the cases: what a case that stays cites, stays too.
    const [taken] = await tx.execute<{ interactions: number }[]>(
      'select remove_demo_interactions() as interactions',
    );
    await removeIdleCampaigns(tx);
    if (accounts.length > 0 || cases > 0) {
      recordTrail(tx, {
        actor: { name: 'demo:remove' },
        action: 'demo.remove',
        subject: { type: 'demo', id: 'lowmoor' },
        after: {
          accounts: accounts.map(({ id }) => id),
          cases,
          interactions: taken?.interactions ?? 0,
        },
        now,
      });
    }
    return { accounts: accounts.length, cases };
  });
}
