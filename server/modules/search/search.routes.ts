import { searchQuerySchema, searchSchema } from '#shared/contracts/search.ts';
import { defineRoute } from '#server/http/route.ts';
import { searchEverything } from './search-everything.ts';

export const searchRoutes = [
  defineRoute({
    method: 'get',
    path: '/api/search',
    operationId: 'search',
    summary:
      'Cases you may read, interactions of the library, nuclides, elements, forms, materials and particles, in groups',
    tag: 'Reference',
    access: 'reference.read',
    query: searchQuerySchema,
    response: searchSchema,
    handler: ({ em, actor, query }) => searchEverything(em, actor, query.q),
  }),
];
