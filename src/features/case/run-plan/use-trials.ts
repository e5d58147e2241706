import { useState } from 'react';
import { useMutation, useQuery } from '@tanstack/react-query';
import { isEnded, jobSchema } from '#shared/contracts/jobs.ts';
import type { Job } from '#shared/contracts/jobs.ts';
import { runPlanTrialsSchema, startedTrialsSchema } from '#shared/contracts/run-plan-trials.ts';
import type { RunPlanTrials } from '#shared/contracts/run-plan-trials.ts';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { inWords, request } from '#src/lib/api.ts';
import { estimateBody } from '../api.ts';

const ASK_EVERY_MS = 700;
const TRIALS = 1_000_000;

interface Started {
  id: string;
  /** What it was started for: the numbers of other inputs are not shown. */
  key: string;
}

export interface Trials {
  start: () => void;
  starting: boolean;
  job: Job | undefined;
  result: RunPlanTrials | undefined;
  cancel: () => void;
  fault: string | null;
}

const jobPath = (id: string): string => `/api/jobs/${encodeURIComponent(id)}`;

/** A Monte Carlo run of one detector, filed for the workers and followed until it ends. */
export function useTrials(document: CaseDocument, detector: string): Trials {
  const plan = { ...document.runPlan, estimate: estimateBody(document) };
  const key = JSON.stringify([plan, detector]);
  const [started, setStarted] = useState<Started | null>(null);
  const id = started?.key === key ? started.id : null;
  const filing = useMutation({
    mutationFn: async () => {
      const body = { plan, detector, trials: TRIALS };
      const path = '/api/run-plans/trials';
      const answer = await request(path, { method: 'POST', body, answer: startedTrialsSchema });
      return { id: answer.id, key };
    },
    onSuccess: setStarted,
  });
  const job = useQuery({
    queryKey: ['job', id],
    queryFn: ({ signal }) => request(jobPath(id ?? ''), { answer: jobSchema, signal }),
    enabled: id !== null,
    refetchInterval: ({ state }) =>
      state.data && isEnded(state.data.state) ? false : ASK_EVERY_MS,
  });
  const result = useQuery({
    queryKey: ['trials', id],
    queryFn: ({ signal }) =>
      request(`/api/run-plans/trials/${encodeURIComponent(id ?? '')}`, {
        answer: runPlanTrialsSchema,
        signal,
      }),
    enabled: job.data?.state === 'done',
    staleTime: Infinity,
  });
  const cancelling = useMutation({
    mutationFn: (which: string) =>
      request(`${jobPath(which)}/cancel`, { method: 'POST', answer: jobSchema }),
    onSuccess: () => job.refetch(),
  });
  const error = filing.error ?? job.error ?? result.error ?? cancelling.error;
  return {
    start: () => filing.mutate(),
    starting: filing.isPending,
    job: id === null ? undefined : job.data,
    result: id === null ? undefined : result.data,
    cancel: () => id !== null && cancelling.mutate(id),
    fault: error ? inWords(error) : (job.data?.error ?? null),
  };
}
