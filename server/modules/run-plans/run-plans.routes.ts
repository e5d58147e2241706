import { runPlanRequestSchema, runPlanSchema } from '#shared/contracts/run-plans.ts';
import { defineRoute } from '#server/http/route.ts';
import { withSlot } from '#server/modules/estimates/in-flight.ts';

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
];
