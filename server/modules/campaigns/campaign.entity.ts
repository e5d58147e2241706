import { defineEntity } from '@mikro-orm/core';
import type { InferEntity } from '@mikro-orm/core';

/** A beam-time period that cases can belong to; its members read and write them. */
export const Campaign = defineEntity({
  name: 'Campaign',
  tableName: 'campaigns',
  properties: (p) => ({
    id: p.uuid().primary(),
    name: p.text().unique(),
    createdBy: p.uuid(),
    createdAt: p.datetime(),
  }),
});
export type Campaign = InferEntity<typeof Campaign>;

export const CampaignMember = defineEntity({
  name: 'CampaignMember',
  tableName: 'campaign_members',
  properties: (p) => ({
    campaignId: p.uuid().primary(),
    accountId: p.uuid().primary(),
    createdAt: p.datetime(),
  }),
});
export type CampaignMember = InferEntity<typeof CampaignMember>;
