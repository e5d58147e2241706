import { z } from 'zod';
import { jobProgressSchema, jobSchema } from '#shared/contracts/jobs.ts';
import { listSchema, pageQuerySchema } from '#shared/contracts/list.ts';
import { defineRoute } from '#server/http/route.ts';
import { jobRow, listJobs, loadJob } from './job-rows.ts';
import { presentJob } from './present-job.ts';
import { cancelJob, resumeJob } from './stop-and-resume.ts';
import { streamProgress } from './stream-progress.ts';

const params = z.object({ id: z.uuid() });
const query = pageQuerySchema.extend({
  active: z.enum(['true', 'false']).default('false'),
  kind: z.string().max(40).optional(),
});
const tag = 'Jobs';

export const jobRoutes = [
  defineRoute({
    method: 'get',
    path: '/api/jobs',
    operationId: 'listJobs',
    summary: 'Jobs you may read, newest first; `active=true` those that wait or run',
    tag,
    access: 'job.list',
    query,
    response: listSchema(jobSchema),
    async handler({ em, actor, query: { page, pageSize, active, kind } }) {
      const asked = { page, pageSize, active: active === 'true', kind };
      const found = await listJobs(em, actor, asked);
      return { items: found.rows.map(presentJob), page, pageSize, total: found.total };
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/jobs/:id',
    operationId: 'readJob',
    summary: 'A job and how far it is',
    tag,
    access: 'job.read',
    visibleBy: 'job.read',
    resource: ({ em, params: { id } }) => loadJob(em, id),
    params,
    response: jobSchema,
    handler: async ({ em, resource }) => presentJob(await jobRow(em, resource.id)),
  }),
  defineRoute({
    method: 'get',
    path: '/api/jobs/:id/events',
    operationId: 'watchJob',
    summary: 'The progress of a job as server-sent events, from now to its end',
    tag,
    access: 'job.read',
    visibleBy: 'job.read',
    resource: ({ em, params: { id } }) => loadJob(em, id),
    params,
    response: jobProgressSchema,
    otherTypes: ['text/event-stream'],
    refusals: ['tooManyRequests'],
    handler: ({ em, actor, resource, headers }) =>
      streamProgress({ em, actor }, resource.id, headers['last-event-id']),
  }),
  defineRoute({
    method: 'post',
    path: '/api/jobs/:id/cancel',
    operationId: 'cancelJob',
    summary: 'Cancel a job; what it has computed is kept',
    tag,
    access: 'job.cancel',
    visibleBy: 'job.read',
    resource: ({ em, params: { id } }) => loadJob(em, id),
    params,
    response: jobSchema,
    refusals: ['conflict'],
    async handler({ em, actor, now, resource }) {
      await cancelJob({ em, actor, now }, resource.id);
      return presentJob(await jobRow(em, resource.id));
    },
  }),
  defineRoute({
    method: 'post',
    path: '/api/jobs/:id/resume',
    operationId: 'resumeJob',
    summary: 'Let a cancelled or failed job go on from what it has',
    tag,
    access: 'job.cancel',
    visibleBy: 'job.read',
    resource: ({ em, params: { id } }) => loadJob(em, id),
    params,
    response: jobSchema,
    refusals: ['conflict'],
    async handler({ em, actor, now, resource }) {
      await resumeJob({ em, actor, now }, resource.id);
      return presentJob(await jobRow(em, resource.id));
    },
  }),
];
