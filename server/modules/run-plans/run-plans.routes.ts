import { z } from 'zod';
import { runPlanRequestSchema, runPlanSchema } from '#shared/contracts/run-plans.ts';
import {
  runPlanTrialsRequestSchema,
  runPlanTrialsSchema,
  startedTrialsSchema,
} from '#shared/contracts/run-plan-trials.ts';
import { defineRoute } from '#server/http/route.ts';
import { withSlot } from '#server/modules/estimates/in-flight.ts';
import { loadJob } from '#server/modules/jobs/job-rows.ts';
import { checkTrials, createTrials } from './create-trials.ts';
import { trialsResult } from './trials-result.ts';

const params = z.object({ id: z.uuid() });

export const runPlanRoutes = [
  defineRoute({
    method: 'post',
    path: '/api/run-plans',
    operationId: 'computeRunPlan',
    summary:
      'A run around a cross section: rates of every detector, times for a precision, limits of detection and whether it can be done; stores nothing',
    tag: 'Run plans',
    access: 'estimate.compute',
    changes: false,
    body: runPlanRequestSchema,
    response: runPlanSchema,
    refusals: ['tooMuchWork', 'tooManyRequests'],
    async handler({ actor, body, compute, signal }) {
      return withSlot(actor.id, () => compute('runPlan', body, signal ? { signal } : {}));
    },
  }),
  defineRoute({
    method: 'post',
    path: '/api/run-plans/trials',
    operationId: 'createRunPlanTrials',
    summary:
      'File a Monte Carlo run of the rate of one detector for the workers; follow and cancel it as any job',
    tag: 'Run plans',
    access: 'scan.create',
    body: runPlanTrialsRequestSchema,
    response: startedTrialsSchema,
    status: 202,
    refusals: ['tooMuchWork', 'tooManyRequests'],
    async handler({ em, actor, now, body, compute, signal }) {
      await withSlot(actor.id, () => checkTrials(body, { compute, signal }));
      return { id: await createTrials({ em, actor, now }, body) };
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/run-plans/trials/:id',
    operationId: 'readRunPlanTrials',
    summary: 'The distribution of a Monte Carlo run that is done',
    tag: 'Run plans',
    access: 'job.read',
    visibleBy: 'job.read',
    resource: ({ em, params: { id } }) => loadJob(em, id, 'runPlanTrials'),
    params,
    response: runPlanTrialsSchema,
    refusals: ['conflict'],
    handler: ({ em, resource }) => trialsResult(em, resource.id),
  }),
];
