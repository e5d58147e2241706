import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import type { z } from 'zod';
import {
  elementsTableSchema,
  formDetailSchema,
  formsTableSchema,
  materialsTableSchema,
  neutronTableSchema,
  nuclideDetailSchema,
  nuclidesTableSchema,
  overviewSchema,
  speciesTableSchema,
  type TableHead,
} from '#shared/contracts/reference.ts';
import { request } from '#src/lib/api.ts';

/** Tables change with an edition of the server, not while one reads. */
const STALE = 10 * 60_000;

export type TableQuery = Readonly<Record<string, string | number | undefined>>;

/** A page of a table, as every list answers it. */
export interface TableAnswer<T> {
  items: T[];
  page: number;
  pageSize: number;
  total: number;
  table: TableHead;
}

function tableAt<T>(name: string, answer: z.ZodType<TableAnswer<T>>) {
  const path = `/api/reference/${name}`;
  return {
    page: (query: TableQuery) =>
      queryOptions({
        queryKey: ['reference', name, query],
        queryFn: ({ signal }) => request(path, { query, answer, signal }),
        placeholderData: keepPreviousData,
        staleTime: STALE,
      }),
    /** Every row that fits, for files. */
    async all(query: TableQuery): Promise<T[]> {
      const rows: T[] = [];
      for (let page = 1; ; page += 1) {
        const part = await request(path, { query: { ...query, page, pageSize: 200 }, answer });
        rows.push(...part.items);
        if (part.items.length === 0 || rows.length >= part.total) return rows;
      }
    },
  };
}
export type TableSource<T> = ReturnType<typeof tableAt<T>>;

export const speciesTable = tableAt('species', speciesTableSchema);
export const nuclidesTable = tableAt('nuclides', nuclidesTableSchema);
export const elementsTable = tableAt('elements', elementsTableSchema);
export const neutronTable = tableAt('neutron-lengths', neutronTableSchema);
export const materialsTable = tableAt('materials', materialsTableSchema);
export const formsTable = tableAt('forms', formsTableSchema);

export const overviewQuery = queryOptions({
  queryKey: ['reference', 'overview'],
  queryFn: ({ signal }) => request('/api/reference', { answer: overviewSchema, signal }),
  staleTime: STALE,
});

export function formQuery(key: string) {
  return queryOptions({
    queryKey: ['reference', 'form', key],
    queryFn: ({ signal }) =>
      request(`/api/reference/forms/${encodeURIComponent(key)}`, {
        answer: formDetailSchema,
        signal,
      }),
    staleTime: STALE,
  });
}

export function nuclideQuery(name: string) {
  return queryOptions({
    queryKey: ['reference', 'nuclide', name],
    queryFn: ({ signal }) =>
      request(`/api/reference/nuclides/${encodeURIComponent(name)}`, {
        answer: nuclideDetailSchema,
        signal,
      }),
    staleTime: STALE,
  });
}
