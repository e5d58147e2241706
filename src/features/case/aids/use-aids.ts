import { keepPreviousData, queryOptions, useQuery } from '@tanstack/react-query';
import type { Aids, AidsRequest } from '#shared/contracts/aids.ts';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { estimateSchema } from '#shared/contracts/estimates.ts';
import type { Estimate, EstimateRequest } from '#shared/contracts/estimates.ts';
import { inWords, request } from '#src/lib/api.ts';
import { estimateBody } from '../api.ts';
import { useEditing } from '../editing/editor-context.ts';
import { useSettled } from '../editing/use-estimate.ts';

const PAUSE_MS = 120;

/** An estimate of this document with what is asked beside it. */
export function aidsQuery(body: EstimateRequest) {
  return queryOptions({
    queryKey: ['aids', body],
    queryFn: ({ signal }) =>
      request('/api/estimates', { method: 'POST', body, answer: estimateSchema, signal }),
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    gcTime: 60_000,
  });
}

export interface LiveAids {
  aids: Aids | undefined;
  /** The estimate they were answered with. */
  estimate: Estimate | undefined;
  stale: boolean;
  failure: string | null;
}

/** What is asked beside the estimate, following the inputs; `change` makes the question cheaper than the whole case. */
export function useLiveAids(
  asked: AidsRequest,
  options: { enabled?: boolean; change?: (document: CaseDocument) => CaseDocument } = {},
): LiveAids {
  const { draft } = useEditing();
  const { enabled = true, change } = options;
  const settled = useSettled(draft.document, PAUSE_MS);
  const document = change ? change(settled) : settled;
  const query = useQuery({
    ...aidsQuery({ ...estimateBody(document), aids: asked }),
    enabled,
  });
  return {
    aids: query.data?.aids,
    estimate: query.data,
    stale: query.isPlaceholderData || query.isPending || settled !== draft.document,
    failure: query.error === null ? null : inWords(query.error),
  };
}
