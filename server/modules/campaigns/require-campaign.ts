import type { EntityManager } from '@mikro-orm/postgresql';
import { DomainError } from '#shared/errors.ts';
import type { Actor } from '#server/http/actor.ts';
import { listCampaigns } from './list-campaigns.ts';

/** Refuses a campaign that the actor may not file a case under, without telling whether it exists. */
export async function requireCampaign(
  em: EntityManager,
  actor: Pick<Actor, 'id' | 'role'>,
  campaignId: string,
): Promise<void> {
  const campaigns = await listCampaigns(em, actor);
  if (campaigns.some(({ id }) => id === campaignId)) return;
  const message =
    'You are not a member of a campaign with this identifier; choose one of yours, or leave it out.';
  throw new DomainError('invalidInput', `/campaignId: ${message}`, {
    errors: [{ path: '/campaignId', message }],
  });
}
