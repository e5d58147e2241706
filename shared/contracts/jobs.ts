import { z } from 'zod';

export const JOB_STATES = ['queued', 'running', 'done', 'failed', 'cancelled'] as const;
export const jobStateSchema = z.enum(JOB_STATES);
export type JobState = z.infer<typeof jobStateSchema>;

/** How far a job is; what its stream of events carries. */
export const jobProgressSchema = z.object({
  id: z.string(),
  state: jobStateSchema,
  /** Parts done, of `total`. */
  done: z.int(),
  total: z.int(),
  /** Of the run so far; null while nothing can be said. */
  secondsLeft: z.number().nullable(),
  /** Workers alive on this database: none means that nothing moves until one is started. */
  workers: z.int(),
  /** Why it failed, in words. */
  error: z.string().nullable(),
});
export type JobProgress = z.infer<typeof jobProgressSchema>;

export const jobSchema = jobProgressSchema
  .extend({
    kind: z.string(),
    title: z.string(),
    owner: z.object({ id: z.string(), name: z.string() }),
    createdAt: z.string(),
    startedAt: z.string().nullable(),
    finishedAt: z.string().nullable(),
  })
  .meta({ id: 'Job' });
export type Job = z.infer<typeof jobSchema>;

export const isEnded = (state: JobState): boolean => state !== 'queued' && state !== 'running';
