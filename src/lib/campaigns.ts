import { queryOptions } from '@tanstack/react-query';
import { z } from 'zod';
import { campaignSchema } from '#shared/contracts/campaigns.ts';
import { request } from './api.ts';

const answer = z.object({ items: z.array(campaignSchema) });

/** The campaigns of the lab, for pickers; `member` marks those one may place a case in. */
export const campaignsQuery = queryOptions({
  queryKey: ['campaigns'],
  queryFn: async ({ signal }) => (await request('/api/campaigns', { answer, signal })).items,
  staleTime: 60_000,
});
