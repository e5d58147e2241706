import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { z } from 'zod';
import type { caseListQuerySchema } from '#shared/contracts/cases.ts';
import { CASE_SORTS, caseListItemSchema, statusSchema } from '#shared/contracts/cases.ts';
import { listSchema } from '#shared/contracts/list.ts';
import { request } from './api.ts';

export type CaseListQuery = Partial<z.infer<typeof caseListQuerySchema>>;
const answer = listSchema(caseListItemSchema);

/** The cases one may see, by search, filter, order and page. */
export function caseListOptions(query: CaseListQuery) {
  return queryOptions({
    queryKey: ['cases', 'list', query],
    queryFn: ({ signal }) => request('/api/cases', { query, answer, signal }),
    placeholderData: keepPreviousData,
  });
}

/** What an address says, read leniently: a part that makes no sense is left out instead of breaking the page. */
export function caseListQueryOf(search: URLSearchParams): CaseListQuery {
  const read = <S extends z.ZodType>(key: string, schema: S) => {
    const parsed = schema.safeParse(search.get(key) ?? undefined);
    return parsed.success && parsed.data !== undefined ? { [key]: parsed.data } : {};
  };
  const text = z.string().min(1).max(200);
  return {
    ...read('q', text),
    ...read('status', statusSchema),
    ...read('tag', z.string().min(1).max(40)),
    ...read('campaign', z.string().min(1).max(40)),
    ...read('owner', z.enum(['me', 'all'])),
    ...read('sort', z.enum(CASE_SORTS)),
    ...read('page', z.coerce.number().int().min(1).max(1_000_000)),
  };
}
