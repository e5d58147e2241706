import { z } from 'zod';
import { engineSchema, estimateBodySchema, estimateSchema } from './estimates.ts';
import { pageQuerySchema } from './list.ts';
import { runPlanBodySchema, runPlanSchema } from './run-plans.ts';
import { requiredTextSchema, textSchema } from './text.ts';

export const CURRENT_FORMAT = 1;

/** The saved document: the body of an estimate plus `format`, and with a run the body of its plan. */
export const caseDocumentSchema = estimateBodySchema.extend({
  format: z.literal(CURRENT_FORMAT).optional(),
  runPlan: runPlanBodySchema.optional(),
});
export type CaseDocument = z.infer<typeof caseDocumentSchema>;

export const STATUSES = [
  'draft',
  'inReview',
  'approved',
  'released',
  'superseded',
  'withdrawn',
] as const;
export const statusSchema = z.enum(STATUSES);
export type Status = z.infer<typeof statusSchema>;

const tags = z
  .array(requiredTextSchema(40, 'A tag'))
  .max(20, 'A case may have at most 20 tags.')
  .transform((list) => [...new Set(list)]);
const title = requiredTextSchema(200, 'The title');
const note = textSchema(2000, 'The note');

export const createCaseSchema = z.strictObject({
  title,
  campaignId: z.uuid('campaignId is the identifier of a campaign.').nullable().optional(),
  tags: tags.optional(),
  note: note.optional(),
  document: caseDocumentSchema,
});
export const createVersionSchema = z.strictObject({
  title: title.optional(),
  tags: tags.optional(),
  note: note.optional(),
  document: caseDocumentSchema,
});
export const withdrawSchema = z.strictObject({ reason: requiredTextSchema(2000, 'The reason') });

const author = z.object({ id: z.string(), name: z.string() });
export const versionHeadSchema = z.object({
  n: z.int(),
  hash: z.string(),
  createdAt: z.string(),
  author,
  note: z.string().optional(),
  status: statusSchema.optional(),
});
export type VersionHead = z.infer<typeof versionHeadSchema>;

/** The four stations in a line each, for lists and headings. */
export const summarySchema = z.object({
  beam: z.string(),
  target: z.string(),
  interaction: z.string(),
  detectors: z.string(),
});
export const caseSchema = z
  .object({
    id: z.string(),
    number: z.int(),
    title: z.string(),
    status: statusSchema,
    releasedVersion: z.int().nullable(),
    tags: z.array(z.string()),
    owner: author,
    campaign: z.object({ id: z.string(), name: z.string() }).nullable(),
    createdAt: z.string(),
    version: versionHeadSchema,
  })
  .meta({ id: 'Case' });
export type Case = z.infer<typeof caseSchema>;

export const caseListItemSchema = caseSchema
  .extend({ summary: summarySchema })
  .meta({ id: 'CaseListItem' });
export type CaseListItem = z.infer<typeof caseListItemSchema>;
export const caseDetailSchema = caseSchema
  .extend({ document: caseDocumentSchema, mayEdit: z.boolean() })
  .meta({ id: 'CaseDetail' });
export type CaseDetail = z.infer<typeof caseDetailSchema>;

export const versionDetailSchema = z
  .object({
    n: z.int(),
    title: z.string(),
    document: caseDocumentSchema,
    result: z.object({ estimate: estimateSchema, runPlan: runPlanSchema.optional() }),
    engine: engineSchema,
    hash: z.string(),
    author,
    createdAt: z.string(),
    note: z.string(),
    status: statusSchema,
  })
  .meta({ id: 'CaseVersion' });
export type VersionDetail = z.infer<typeof versionDetailSchema>;

export const CASE_SORTS = ['number', '-number', 'title', '-title', 'updated', '-updated'] as const;
export const caseListQuerySchema = pageQuerySchema.extend({
  q: z.string().max(200).optional(),
  status: statusSchema.optional(),
  tag: z.string().max(40).optional(),
  campaign: z.string().max(40).optional(),
  owner: z.enum(['me', 'all']).optional(),
  sort: z.enum(CASE_SORTS).default('-updated'),
});
