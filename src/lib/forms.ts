import { queryOptions } from '@tanstack/react-query';
import { formsSchema } from '#shared/contracts/forms.ts';
import { request } from './api.ts';

/** The register of interaction forms; it changes with an edition of the server, not while one works. */
export const formsQuery = queryOptions({
  queryKey: ['forms'],
  queryFn: async ({ signal }) =>
    (await request('/api/forms', { answer: formsSchema, signal })).forms,
  staleTime: Infinity,
});
