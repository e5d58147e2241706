import { campaignSchema } from '#shared/contracts/campaigns.ts';
import { listSchema, pageQuerySchema } from '#shared/contracts/list.ts';
import { defineRoute } from '#server/http/route.ts';
import { listCampaigns } from './list-campaigns.ts';

export const campaignRoutes = [
  defineRoute({
    method: 'get',
    path: '/api/campaigns',
    operationId: 'listCampaigns',
    summary: 'Campaigns a case can be filed under: your own, or all for lab managers',
    tag: 'Campaigns',
    access: 'campaign.list',
    query: pageQuerySchema,
    response: listSchema(campaignSchema),
    async handler({ em, actor, query: { page, pageSize } }) {
      const campaigns = await listCampaigns(em, actor);
      const from = (page - 1) * pageSize;
      return {
        items: campaigns.slice(from, from + pageSize),
        page,
        pageSize,
        total: campaigns.length,
      };
    },
  }),
];
