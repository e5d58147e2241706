import { materialAidsRequestSchema, materialAidsSchema } from '#shared/contracts/material-aids.ts';
import { defineRoute } from '#server/http/route.ts';
import { withSlot } from '#server/modules/estimates/in-flight.ts';

export const materialAidRoutes = [
  defineRoute({
    method: 'post',
    path: '/api/material-aids',
    operationId: 'computeMaterialAids',
    summary:
      'A case in a material: mean free path, and for neutrons scattering length density, transmission and ten-per-cent thickness; stores nothing',
    tag: 'Estimates',
    access: 'estimate.compute',
    changes: false,
    body: materialAidsRequestSchema,
    response: materialAidsSchema,
    refusals: ['tooMuchWork', 'tooManyRequests'],
    async handler({ actor, body, compute, signal }) {
      return withSlot(actor.id, () => compute('materialAids', body, signal ? { signal } : {}));
    },
  }),
];
