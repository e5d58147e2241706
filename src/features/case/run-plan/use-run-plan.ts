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

function runPlanQuery(document: CaseDocument) {
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
    enabled: runPlan !== undefined,
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
  errors: readonly FieldError[];
  failure: string | null;
  retry: () => void;
}

/** What the run yields, following the inputs. The last good answer stays while the next is on its way or refused. */
export function useRunPlan(document: CaseDocument): LiveRunPlan {
  const settled = useSettled(document, PAUSE_MS);
  const query = useQuery(runPlanQuery(settled));
  const [last, setLast] = useState<RunPlan | undefined>(query.data);
  if (query.data && query.data !== last) setLast(query.data);
  const { error } = query;
  const errors = useMemo(
    () => (error instanceof ApiError ? error.errors.map(inDocument) : []),
    [error],
  );
  return {
    plan: query.data ?? last,
    stale: query.isPlaceholderData || query.data === undefined || settled !== document,
    errors,
    failure: error !== null && errors.length === 0 ? inWords(error) : null,
    retry: () => void query.refetch(),
  };
}
