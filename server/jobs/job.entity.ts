import { defineEntity } from '@mikro-orm/core';
import type { InferEntity } from '@mikro-orm/core';
import type { JobState } from '#shared/contracts/jobs.ts';

/** Work for the workers: what was asked, how far it is, and how it ended. Its shares and parts are rows of their own. */
export const Job = defineEntity({
  name: 'Job',
  tableName: 'jobs',
  properties: (p) => ({
    id: p.uuid().primary(),
    kind: p.text(),
    /** In words, for lists. */
    title: p.text(),
    ownerId: p.uuid(),
    campaignId: p.uuid().nullable(),
    input: p.json<unknown>().columnType('jsonb'),
    state: p.text().$type<JobState>(),
    done: p.integer(),
    total: p.integer(),
    /** Why it failed, in words. */
    error: p.text().nullable(),
    /** What the kind made of all parts; null where the parts are the result. */
    result: p.json<unknown>().columnType('jsonb').nullable(),
    createdAt: p.datetime(),
    startedAt: p.datetime().nullable(),
    /** When a share of it was last given to a worker: jobs take turns by it. */
    servedAt: p.datetime().nullable(),
    finishedAt: p.datetime().nullable(),
  }),
});
export type Job = InferEntity<typeof Job>;
