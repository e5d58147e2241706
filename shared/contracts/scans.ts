import { z } from 'zod';
import { METHODS, FRAMES, VERDICTS, estimateRequestSchema } from './estimates.ts';
import { jobProgressSchema } from './jobs.ts';
import { requiredTextSchema } from './text.ts';

/** Points of one scan, and numbers of its result, at most. */
export const MAX_SCAN_POINTS = 100_000;
export const MAX_SCAN_VALUES = 200_000;

const number = z.number('Give a number.');
const quantity = z.strictObject({
  value: z.number('value must be a number.'),
  unit: z.string().max(24),
});
export const scanValueSchema = z.union(
  [quantity, number],
  'Give a quantity {"value", "unit"}, or a plain number where the input is one.',
);
export type ScanValue = z.infer<typeof scanValueSchema>;

const path = z
  .string('path is a JSON Pointer into the estimate, such as "/energy".')
  .max(200)
  .regex(/^(\/[^/]+)+$/, 'path is a JSON Pointer into the estimate, such as "/energy".');

const stepsSchema = z.strictObject({
  path,
  from: scanValueSchema,
  to: scanValueSchema,
  count: z
    .int('count must be a whole number.')
    .min(1, 'count must be at least 1.')
    .max(MAX_SCAN_POINTS, `A scan may have at most ${MAX_SCAN_POINTS} points.`),
  scale: z.enum(['lin', 'log']).default('lin'),
});
const listedSchema = z.strictObject({
  path,
  values: z
    .array(scanValueSchema)
    .min(1, 'Give at least one value.')
    .max(MAX_SCAN_POINTS, `A scan may have at most ${MAX_SCAN_POINTS} points.`),
});
export const scanAxisSchema = z.union(
  [stepsSchema, listedSchema],
  'An axis is {"path", "from", "to", "count", "scale"?} or {"path", "values": […]}.',
);
export type ScanAxis = z.infer<typeof scanAxisSchema>;

/** `verdict` is the word of the verdict on first order, as an estimate by this method finds it. */
export const SCAN_OUTPUTS = ['total', 'dcs', 'verdict'] as const;
export type ScanOutput = (typeof SCAN_OUTPUTS)[number];

export const scanRequestSchema = z
  .strictObject({
    estimate: estimateRequestSchema,
    method: z.enum(METHODS),
    axes: z
      .array(scanAxisSchema)
      .min(1, 'Give one axis or two.')
      .max(2, 'A scan may have at most two axes.'),
    output: z.enum(SCAN_OUTPUTS),
    /** In words, for the list of jobs; made of the axes where it is left out. */
    title: requiredTextSchema(200, 'The title').optional(),
    /** Its members may read the scan. */
    campaignId: z.uuid('campaignId is the identifier of a campaign.').nullable().optional(),
  })
  .meta({ id: 'ScanRequest' });
export type ScanRequest = z.infer<typeof scanRequestSchema>;

export const startedScanSchema = z.object({ id: z.string() });

export const scanSchema = jobProgressSchema
  .omit({ state: true })
  .extend({
    /** As the state of its job. */
    status: jobProgressSchema.shape.state,
    title: z.string(),
  })
  .meta({ id: 'Scan' });
export type Scan = z.infer<typeof scanSchema>;

const axisValues = z.object({
  path: z.string(),
  /** That of `from` or of the first value; null where the input is a plain number. */
  unit: z.string().nullable(),
  values: z.array(z.number()),
});
const value = z.union([z.number(), z.enum(VERDICTS)]).nullable();
const row = z.union([z.array(value), z.array(z.array(value))]);

export const scanResultSchema = z
  .object({
    id: z.string(),
    method: z.enum(METHODS),
    output: z.enum(SCAN_OUTPUTS),
    /** Of the values: `angstrom2`, `angstrom2/sr`; null for verdicts. */
    unit: z.string().nullable(),
    axes: z.array(axisValues),
    /** With dcs: the innermost list of `values` runs over them. */
    angles: z
      .object({ unit: z.string(), frame: z.enum(FRAMES), values: z.array(z.number()) })
      .optional(),
    /** A number (or a verdict) a point, nested by axis in their order; null where there is none. */
    values: z.union([z.array(value), z.array(row)]),
    /** Why points have no value: each reason, how many points it concerns, and the first of them, counted in order from 0. */
    empty: z.array(z.object({ reason: z.string(), points: z.int(), first: z.int() })),
    /** Versions of the engine that computed the points. */
    engines: z.array(z.string()),
  })
  .meta({ id: 'ScanResult' });
export type ScanResult = z.infer<typeof scanResultSchema>;
