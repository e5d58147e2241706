import { useCallback, useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import { caseListQueryOf, type CaseListQuery } from '#src/lib/case-list.ts';

export type Changes = Partial<Record<keyof CaseListQuery, string | undefined>>;

/** The search with some parts changed; a new filter begins at the first page again. */
export function withChanges(search: URLSearchParams, changes: Changes): URLSearchParams {
  const next = new URLSearchParams(search);
  if (!('page' in changes)) next.delete('page');
  for (const [key, value] of Object.entries(changes)) {
    if (value === undefined || value === '') next.delete(key);
    else next.set(key, value);
  }
  return next;
}

/** Search, filter, order and page live in the address, so that any view can be linked and reopened. */
export function useCaseAddress() {
  const [search, setSearch] = useSearchParams();
  const query = useMemo(() => caseListQueryOf(search), [search]);
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
export type CaseAddress = ReturnType<typeof useCaseAddress>;
