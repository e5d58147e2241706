import { useMemo, useState } from 'react';
import { keepPreviousData, queryOptions, useQuery } from '@tanstack/react-query';
import { runPlanSchema } from '#shared/contracts/run-plans.ts';
import type { RunPlan } from '#shared/contracts/run-plans.ts';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { FieldError } from '#shared/errors.ts';
import { ApiError, inWords, request } from '#src/lib/api.ts';
import { estimateBody } from '../api.ts';
import { useSettled } from '../editing/use-estimate.ts';

const PAUSE_MS = 150;
const NO_ERRORS: readonly FieldError[] = [];

function runPlanQuery(document: CaseDocument, wanted: boolean) {
  const { runPlan } = document;
  const body = { ...runPlan, estimate: estimateBody(document) };
  return queryOptions({
    queryKey: ['run-plan', body],
    queryFn: ({ signal }) =>
      request('/api/run-plans', { method: 'POST', body, answer: runPlanSchema, signal }),
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    gcTime: 60_000,
    retry: false,
    enabled: wanted && runPlan !== undefined,
  });
}

/** In the request the estimate stands inside the plan, in the document the plan inside the estimate. */
function inDocument({ path, message }: FieldError): FieldError {
  const place = path.startsWith('/estimate') ? path.slice('/estimate'.length) : `/runPlan${path}`;
  return { path: place, message };
}

export interface LiveRunPlan {
  plan: RunPlan | undefined;
  stale: boolean;
  /** Pointers into the document. */
  errors: readonly FieldError[];
  /** A failure that no field is to blame for. */
  failure: string | null;
  retry: () => void;
}

/**
 * What the run yields, following the inputs. The last good answer stays while the next is on its way or refused.
 * A result that was saved is shown as it was saved: nothing is computed then.
 */
export function useRunPlan(document: CaseDocument, saved: RunPlan | undefined): LiveRunPlan {
  const settled = useSettled(document, PAUSE_MS);
  const query = useQuery(runPlanQuery(settled, saved === undefined));
  const [last, setLast] = useState<RunPlan | undefined>(query.data);
  if (query.data && query.data !== last) setLast(query.data);
  const { error } = query;
  const errors = useMemo(
    () => (error instanceof ApiError ? error.errors.map(inDocument) : NO_ERRORS),
    [error],
  );
  const waits = query.isPlaceholderData || query.data === undefined || settled !== document;
  return {
    plan: saved ?? query.data ?? last,
    stale: saved === undefined && waits,
    errors,
    failure: error !== null && errors.length === 0 ? inWords(error) : null,
    retry: () => void query.refetch(),
  };
}
