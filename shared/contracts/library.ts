import { z } from 'zod';
import { quantitySchema, toInternal } from '#shared/units/quantity.ts';
import { statusSchema } from './cases.ts';
import { estimateBodySchema, interactionSchema, speciesSchema } from './estimates.ts';
import { pageQuerySchema } from './list.ts';
import { requiredTextSchema, textSchema } from './text.ts';

const energy = quantitySchema('energy').refine((q) => q.value > 0, 'An energy is above zero.');

/** Between which energies, lab, an interaction is meant to hold; either end may be open. */
const energyRange = z
  .strictObject({ from: energy.optional(), to: energy.optional() })
  .refine(({ from, to }) => from !== undefined || to !== undefined, 'Give from, to, or both.')
  .refine(
    ({ from, to }) =>
      from === undefined ||
      to === undefined ||
      toInternal(from, 'energy') < toInternal(to, 'energy'),
    { path: ['to'], message: 'The range ends above the energy it begins at.' },
  );

/** Where an interaction holds: in words for people, and as far as it can be said, in numbers for pages. */
export const validityRangeSchema = z.strictObject({
  words: requiredTextSchema(2000, 'The validity'),
  energy: energyRange.optional(),
  species: z
    .array(speciesSchema)
    .min(1, 'Name a species, or leave species out.')
    .max(10)
    .refine((list) => new Set(list).size === list.length, 'A species is named twice.')
    .optional(),
});
export type ValidityRange = z.infer<typeof validityRangeSchema>;

/** A collision the interaction belongs to: it is checked with it, drawn with it, and a new case begins with it. */
export const exampleSchema = estimateBodySchema.pick({
  projectile: true,
  target: true,
  energy: true,
  kinematics: true,
  units: true,
});
export type Example = z.infer<typeof exampleSchema>;

const tags = z
  .array(requiredTextSchema(40, 'A tag'))
  .max(20, 'An interaction may have at most 20 tags.')
  .transform((list) => [...new Set(list)]);

const content = {
  name: requiredTextSchema(120, 'The name'),
  description: requiredTextSchema(4000, 'The description'),
  validity: validityRangeSchema,
  source: requiredTextSchema(1000, 'The source'),
  terms: interactionSchema.shape.terms,
  tags: tags.default([]),
};

/** What is published, and what a further version consists of: the whole, never a part. */
export const publishInteractionSchema = z
  .strictObject({
    ...content,
    example: exampleSchema.optional(),
    note: textSchema(2000, 'The note').optional(),
  })
  .meta({ id: 'PublishInteraction' });
export type PublishInteraction = z.infer<typeof publishInteractionSchema>;

/** What a version keeps; its hash is over this. */
export const interactionContentSchema = z.strictObject({ ...content, example: exampleSchema });
export type InteractionContent = z.infer<typeof interactionContentSchema>;

export const retireInteractionSchema = z.strictObject({
  reason: requiredTextSchema(2000, 'The reason'),
});

export const INTERACTION_STATUSES = ['published', 'retired'] as const;
export type InteractionStatus = (typeof INTERACTION_STATUSES)[number];

const person = z.object({ id: z.string(), name: z.string() });

export const interactionHeadSchema = z.object({
  n: z.int(),
  hash: z.string(),
  createdAt: z.string(),
  author: person,
  note: z.string(),
});
export type InteractionHead = z.infer<typeof interactionHeadSchema>;

const state = {
  id: z.string(),
  status: z.enum(INTERACTION_STATUSES),
  /** Why, by whom and when; null while it is published. */
  retired: z.object({ reason: z.string(), by: person, at: z.string() }).nullable(),
  owner: person,
  createdAt: z.string(),
  updatedAt: z.string(),
  /** The terms in a line, as the trade would write them. */
  summary: z.string(),
};

export const interactionItemSchema = z
  .object({
    ...state,
    name: z.string(),
    description: z.string(),
    validity: validityRangeSchema,
    source: z.string(),
    tags: z.array(z.string()),
    version: interactionHeadSchema,
  })
  .meta({ id: 'InteractionItem' });
export type InteractionItem = z.infer<typeof interactionItemSchema>;

const whole = interactionContentSchema.extend({
  ...state,
  version: interactionHeadSchema,
  newestVersion: z.int(),
  /** What this person may do here. */
  may: z.object({ publish: z.boolean(), retire: z.boolean() }),
});

export const interactionVersionSchema = whole.meta({ id: 'InteractionVersion' });
export type InteractionVersion = z.infer<typeof interactionVersionSchema>;

/** The newest version, with the heads of all, newest first. */
export const interactionDetailSchema = whole
  .extend({ versions: z.array(interactionHeadSchema) })
  .meta({ id: 'Interaction' });
export type InteractionDetail = z.infer<typeof interactionDetailSchema>;

/** A case whose newest version cites an interaction. */
export const citingCaseSchema = z
  .object({
    id: z.string(),
    number: z.int(),
    title: z.string(),
    status: statusSchema,
    owner: person,
    version: z.int(),
    citedVersion: z.int(),
  })
  .meta({ id: 'CitingCase' });
export type CitingCase = z.infer<typeof citingCaseSchema>;

export const INTERACTION_SORTS = ['name', '-name', 'updated', '-updated'] as const;
export const interactionListQuerySchema = pageQuerySchema.extend({
  q: z.string().max(200).optional(),
  tag: z.string().max(40).optional(),
  /** Published ones unless asked otherwise. */
  status: z.enum([...INTERACTION_STATUSES, 'all']).default('published'),
  sort: z.enum(INTERACTION_SORTS).default('name'),
});
