import { z } from 'zod';

export const SEARCH_KINDS = [
  'cases',
  'interactions',
  'nuclides',
  'elements',
  'forms',
  'materials',
  'species',
] as const;
export type SearchKind = (typeof SEARCH_KINDS)[number];
/** Hits a group shows at most. */
export const HITS_PER_GROUP = 8;

export const searchQuerySchema = z.object({ q: z.string().max(200) });

export const hitSchema = z.object({
  /** What names it: identifier of a case or an interaction, nuclide, symbol, key of a form, material or species. */
  key: z.string(),
  label: z.string(),
  /** One line that tells it from its neighbours. */
  detail: z.string(),
});
export type Hit = z.infer<typeof hitSchema>;

/** Groups with hits, the best first; `total` counts all there are. */
export const searchSchema = z
  .object({
    q: z.string(),
    groups: z.array(
      z.object({ kind: z.enum(SEARCH_KINDS), hits: z.array(hitSchema), total: z.int() }),
    ),
  })
  .meta({ id: 'SearchAnswer' });
export type SearchAnswer = z.infer<typeof searchSchema>;
