import { queryOptions } from '@tanstack/react-query';
import { START_KINDS, startSchema, type StartKind } from '#shared/contracts/reference.ts';
import { request } from './api.ts';

/** Something from the Reference that a new case begins with: `/cases/new?nuclide=Ca-40`. */
export interface ReferenceStart {
  kind: StartKind;
  name: string;
}

export function startHref({ kind, name }: ReferenceStart): string {
  return `/cases/new?${kind}=${encodeURIComponent(name)}`;
}

/** What the address of a new case asks for; null where it names nothing from the Reference. */
export function referenceStartOf(search: URLSearchParams): ReferenceStart | null {
  const kind = START_KINDS.find((known) => search.get(known));
  return kind ? { kind, name: search.get(kind) ?? '' } : null;
}

export function startQuery(start: ReferenceStart) {
  return queryOptions({
    queryKey: ['reference', 'start', start],
    queryFn: ({ signal }) =>
      request('/api/reference/start', { query: { ...start }, answer: startSchema, signal }),
    staleTime: Infinity,
  });
}
