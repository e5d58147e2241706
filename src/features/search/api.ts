import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { searchSchema } from '#shared/contracts/search.ts';
import { request } from '#src/lib/api.ts';

/** Hits over cases and tables; the signal takes back what is no longer asked. */
export function searchQuery(q: string) {
  return queryOptions({
    queryKey: ['search', q],
    queryFn: ({ signal }) => request('/api/search', { query: { q }, answer: searchSchema, signal }),
    enabled: q !== '',
    placeholderData: keepPreviousData,
    staleTime: 30_000,
  });
}
