import { estimateRequestSchema, estimateSchema } from '#shared/contracts/estimates.ts';
import { defineRoute } from '#server/http/route.ts';
import { estimate } from './estimate.ts';
import { withSlot } from './in-flight.ts';

export const estimateRoutes = [
  defineRoute({
    method: 'post',
    path: '/api/estimates',
    operationId: 'computeEstimate',
    summary: 'Cross sections, golden-rule sheet and verdict of one collision; stores nothing',
    tag: 'Estimates',
    access: 'estimate.compute',
    changes: false,
    body: estimateRequestSchema,
    response: estimateSchema,
    refusals: ['tooMuchWork', 'tooManyRequests'],
    async handler({ em, actor, body, compute, signal }) {
      return withSlot(actor.id, () => estimate(body, { em, compute, signal }));
    },
  }),
];
