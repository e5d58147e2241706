import type { EntityManager } from '@mikro-orm/postgresql';
import type { Campaign as CampaignView } from '#shared/contracts/campaigns.ts';
import { PERMISSIONS } from '#shared/roles.ts';
import type { Actor } from '#server/http/actor.ts';

/** Campaigns the actor may file a case under, by name: their own; all of them for whoever reads every case. */
export async function listCampaigns(
  em: EntityManager,
  actor: Pick<Actor, 'id' | 'role'>,
): Promise<CampaignView[]> {
  const all = PERMISSIONS[actor.role]['case.read'] === 'any';
  return em.execute<CampaignView[]>(
    `select g.id, g.name, m.account_id is not null as member
     from campaigns g left join campaign_members m on m.campaign_id = g.id and m.account_id = ?
     where ? or m.account_id is not null
     order by lower(g.name)`,
    [actor.id, all],
  );
}
