import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import type { QueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { estimateSchema } from '#shared/contracts/estimates.ts';
import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import {
  citingCaseSchema,
  interactionDetailSchema,
  interactionItemSchema,
  interactionVersionSchema,
} from '#shared/contracts/library.ts';
import type {
  InteractionContent,
  InteractionVersion,
  PublishInteraction,
  interactionListQuerySchema,
} from '#shared/contracts/library.ts';
import { listSchema } from '#shared/contracts/list.ts';
import { isOriginal } from '#shared/contracts/terms.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { request, requestTagged } from './api.ts';

const ROOT = '/api/interactions';
const at = (id: string): string => `${ROOT}/${encodeURIComponent(id)}`;

export type InteractionListQuery = Partial<z.infer<typeof interactionListQuerySchema>>;

/** The lab's interactions, by search, filter, order and page. */
export function interactionListOptions(query: InteractionListQuery) {
  return queryOptions({
    queryKey: ['interactions', 'list', query],
    queryFn: ({ signal }) =>
      request(ROOT, { query, answer: listSchema(interactionItemSchema), signal }),
    placeholderData: keepPreviousData,
  });
}

/** An interaction at its newest version, with its tag. */
export function interactionQuery(id: string) {
  return queryOptions({
    queryKey: ['interactions', id],
    queryFn: ({ signal }) => requestTagged(at(id), { answer: interactionDetailSchema, signal }),
  });
}

/** What a version says never changes. */
export function interactionVersionQuery(id: string, n: number) {
  return queryOptions({
    queryKey: ['interactions', id, 'versions', n],
    queryFn: ({ signal }) =>
      request(`${at(id)}/versions/${n}`, { answer: interactionVersionSchema, signal }),
  });
}

export function citingCasesQuery(id: string) {
  return queryOptions({
    queryKey: ['interactions', id, 'cases'],
    queryFn: ({ signal }) =>
      request(`${at(id)}/cases`, {
        query: { pageSize: 50 },
        answer: listSchema(citingCaseSchema),
        signal,
      }),
  });
}

function bare(term: InteractionTerm): InteractionTerm {
  const members = Object.entries(term).filter(([, value]) => !isOriginal(value));
  return { ...Object.fromEntries(members), form: term.form };
}

/** V(r) of an interaction in the collision it was published with: the browser evaluates no potential. */
export function interactionCurveQuery({ terms, example }: InteractionContent) {
  const body: EstimateRequest = {
    ...example,
    interaction: { terms: terms.map(bare) },
    methods: ['born1'],
    angles: { unit: 'deg', values: [90] },
  };
  return queryOptions({
    queryKey: ['interactions', 'curve', body],
    queryFn: async ({ signal }) => {
      const answer = await request('/api/estimates', {
        method: 'POST',
        body,
        answer: estimateSchema,
        signal,
      });
      return answer.potential;
    },
    staleTime: Infinity,
  });
}

/** `key` makes a repeated request after a lost answer the same publication, not a second one. */
export function publishInteraction(body: PublishInteraction, key: string) {
  return requestTagged(ROOT, {
    method: 'POST',
    body,
    headers: { 'idempotency-key': key },
    answer: interactionDetailSchema,
  });
}

export function addInteractionVersion(
  id: string,
  body: PublishInteraction,
  { etag, key }: { etag: string; key: string },
) {
  return requestTagged(`${at(id)}/versions`, {
    method: 'POST',
    body,
    headers: { 'if-match': etag, 'idempotency-key': key },
    answer: interactionDetailSchema,
  });
}

export function changeInteractionStatus(
  id: string,
  deed: 'retire' | 'reinstate',
  { reason, etag }: { reason: string; etag: string },
) {
  return requestTagged(`${at(id)}/${deed}`, {
    method: 'POST',
    body: { reason },
    headers: { 'if-match': etag },
    answer: interactionDetailSchema,
  });
}

/** After a publication or a change of status nothing that was fetched of the library is right any more. */
export async function forgetLibrary(client: QueryClient): Promise<void> {
  await client.invalidateQueries({ queryKey: ['interactions'] });
}

export function interactionHref(id: string, n?: number): string {
  return `/library/interactions/${id}${n === undefined ? '' : `/versions/${n}`}`;
}

/** A new case with this version in it. */
export function caseWithHref({ id, version }: Pick<InteractionVersion, 'id' | 'version'>): string {
  return `/cases/new?interaction=${id}&version=${version.n}`;
}
