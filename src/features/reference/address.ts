import { useCallback, useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import { z } from 'zod';
import type { TableQuery } from './api.ts';

export type Changes = Readonly<Record<string, string | undefined>>;

const page = z.coerce.number().int().min(1).max(1_000_000);
const word = z.string().min(1).max(200);

/** What an address says, read leniently: a part that makes no sense is left out. `filters` names the values each filter may have; an empty list allows any word. */
export function tableQueryOf(
  search: URLSearchParams,
  sorts: readonly string[],
  filters: Readonly<Record<string, readonly string[]>>,
): TableQuery {
  const query: Record<string, string | number> = {};
  const asked = page.safeParse(search.get('page') ?? undefined);
  if (asked.success) query['page'] = asked.data;
  const q = word.safeParse(search.get('q')?.trim() ?? undefined);
  if (q.success) query['q'] = q.data;
  const sort = search.get('sort') ?? '';
  if (sorts.includes(sort.replace(/^-/, ''))) query['sort'] = sort;
  for (const [key, values] of Object.entries(filters)) {
    const value = search.get(key) ?? '';
    if (value !== '' && value.length <= 60 && (values.length === 0 || values.includes(value))) {
      query[key] = value;
    }
  }
  return query;
}

function withChanges(search: URLSearchParams, changes: Changes): URLSearchParams {
  const next = new URLSearchParams(search);
  if (!('page' in changes)) next.delete('page');
  for (const [key, value] of Object.entries(changes)) {
    if (value === undefined || value === '') next.delete(key);
    else next.set(key, value);
  }
  return next;
}

/** Search, order, filters and page of a table live in the address, so that any view can be linked and reopened. */
export function useTableAddress(
  sorts: readonly string[],
  filters: Readonly<Record<string, readonly string[]>>,
) {
  const [search, setSearch] = useSearchParams();
  const query = useMemo(() => tableQueryOf(search, sorts, filters), [search, sorts, filters]);
  const change = useCallback(
    (changes: Changes, replace = false) =>
      setSearch((current) => withChanges(current, changes), {
        replace,
        state: { keepFocus: true },
      }),
    [setSearch],
  );
  const hrefWith = (changes: Changes) => `?${withChanges(search, changes).toString()}`;
  return { query, change, hrefWith };
}
export type TableAddress = ReturnType<typeof useTableAddress>;
