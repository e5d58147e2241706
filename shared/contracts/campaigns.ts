import { z } from 'zod';

/** A campaign as the picker needs it. */
export const campaignSchema = z
  .object({ id: z.string(), name: z.string(), member: z.boolean() })
  .meta({ id: 'Campaign' });
export type Campaign = z.infer<typeof campaignSchema>;
