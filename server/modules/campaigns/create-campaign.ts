import { randomUUID } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/postgresql';
import type { Actor } from '#server/http/actor.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import { Campaign, CampaignMember } from './campaign.entity.ts';

export interface OpeningContext {
  em: EntityManager;
  actor: Pick<Actor, 'id' | 'name'> & Partial<Pick<Actor, 'credential'>>;
  now: Date;
}

/** Opens a campaign with its first members. */
export async function createCampaign(
  { em, actor, now }: OpeningContext,
  { name, memberIds }: { name: string; memberIds: readonly string[] },
): Promise<Campaign> {
  return em.transactional(async (tx) => {
    const campaign = tx.create(
      Campaign,
      { id: randomUUID(), name, createdBy: actor.id, createdAt: now },
      { persist: true },
    );
    await tx.flush();
    for (const accountId of memberIds) {
      tx.create(
        CampaignMember,
        { campaignId: campaign.id, accountId, createdAt: now },
        { persist: true },
      );
    }
    const subject = { type: 'campaign', id: campaign.id };
    recordTrail(tx, { actor, action: 'campaign.create', subject, after: { name, memberIds }, now });
    return campaign;
  });
}
