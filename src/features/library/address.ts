import { useCallback, useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import { z } from 'zod';
import { INTERACTION_SORTS, INTERACTION_STATUSES } from '#shared/contracts/library.ts';
import type { InteractionListQuery } from '#src/lib/library.ts';

export type Changes = Partial<Record<keyof InteractionListQuery, string | undefined>>;

/** What an address says, read leniently: a part that makes no sense is left out instead of breaking the page. */
export function libraryQueryOf(search: URLSearchParams): InteractionListQuery {
  const read = <S extends z.ZodType>(key: string, schema: S) => {
    const parsed = schema.safeParse(search.get(key) ?? undefined);
    return parsed.success && parsed.data !== undefined ? { [key]: parsed.data } : {};
  };
  return {
    ...read('q', z.string().min(1).max(200)),
    ...read('tag', z.string().min(1).max(40)),
    ...read('status', z.enum([...INTERACTION_STATUSES, 'all'])),
    ...read('sort', z.enum(INTERACTION_SORTS)),
    ...read('page', z.coerce.number().int().min(1).max(1_000_000)),
  };
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

/** Search, filter, order and page live in the address, so that any view can be linked and reopened. */
export function useLibraryAddress() {
  const [search, setSearch] = useSearchParams();
  const query = useMemo(() => libraryQueryOf(search), [search]);
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
export type LibraryAddress = ReturnType<typeof useLibraryAddress>;
