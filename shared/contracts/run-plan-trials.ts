import { z } from 'zod';
import { runPlanRequestSchema } from './run-plans.ts';

/* Monte Carlo of one position of a run plan (JCGM 101): filed for the workers, followed and cancelled as any job. */

export const LEAST_TRIALS = 1_000;
export const MOST_TRIALS = 10_000_000;

export const runPlanTrialsRequestSchema = z
  .strictObject({
    plan: runPlanRequestSchema,
    /** Name of the detector whose rate is drawn. */
    detector: z.string().min(1).max(40),
    trials: z
      .int('trials is a whole number.')
      .min(LEAST_TRIALS, 'At least 1,000 trials.')
      .max(MOST_TRIALS, 'At most 10,000,000 trials.')
      .default(1_000_000),
    /** The same seed draws the same numbers on every machine. */
    seed: z
      .int('A seed is a whole number.')
      .min(0, 'A seed lies between 0 and 4294967295.')
      .max(4_294_967_295, 'A seed lies between 0 and 4294967295.')
      .default(1),
    coverage: z
      .number()
      .gt(0.5, 'A coverage probability lies between 0.5 and 0.999.')
      .lt(0.9991, 'A coverage probability lies between 0.5 and 0.999.')
      .default(0.95),
  })
  .meta({ id: 'RunPlanTrialsRequest' });
export type RunPlanTrialsRequest = z.infer<typeof runPlanTrialsRequestSchema>;

export const startedTrialsSchema = z.object({ id: z.string() });

const quantity = z.object({ value: z.number(), unit: z.string() });
const interval = z.tuple([z.number(), z.number()]);

export const runPlanTrialsSchema = z
  .object({
    detector: z.string(),
    trials: z.int(),
    seed: z.int(),
    generator: z.string(),
    coverage: z.number(),
    /** Signal rate of the plan; everything below is relative to it. */
    rate: quantity,
    mean: z.number(),
    standardDeviation: z.number(),
    /** Standard error of the mean, from the trials alone. */
    meanError: z.number(),
    /** Probabilistically symmetric, and shortest. */
    interval,
    shortest: interval,
    /** To which the ends of the intervals are known. */
    resolution: z.number(),
    /** The same by the law of propagation, for comparison. */
    budget: z.object({ combined: z.number(), interval }),
    histogram: z.object({ from: z.number(), to: z.number(), counts: z.array(z.int()) }),
  })
  .meta({ id: 'RunPlanTrials' });
export type RunPlanTrials = z.infer<typeof runPlanTrialsSchema>;
