import { useEffect, useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import type { FieldError } from '#shared/errors.ts';
import { ApiError, inWords } from '#src/lib/api.ts';
import { estimateQuery } from '../api.ts';

const PAUSE_MS = 100;
const NO_ERRORS: readonly FieldError[] = [];

/** A value that follows another once that has stood still for a moment. */
export function useSettled<T>(value: T, pause: number): T {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), pause);
    return () => clearTimeout(timer);
  }, [value, pause]);
  return settled;
}

export interface LiveEstimate {
  estimate: Estimate | undefined;
  /** True while the numbers shown are not those of the inputs shown. */
  stale: boolean;
  errors: readonly FieldError[];
  /** A failure that no field is to blame for. */
  failure: string | null;
  retry: () => void;
}

/** The results that follow the typing. The last good ones stay while the next are on their way or refused. */
export function useLiveEstimate(document: CaseDocument): LiveEstimate {
  const settled = useSettled(document, PAUSE_MS);
  const query = useQuery(estimateQuery(settled));
  const [last, setLast] = useState<Estimate | undefined>(query.data);
  if (query.data && query.data !== last) setLast(query.data);
  const { error } = query;
  const errors = error instanceof ApiError ? error.errors : NO_ERRORS;
  return {
    estimate: query.data ?? last,
    stale: query.isPlaceholderData || query.data === undefined || settled !== document,
    errors,
    failure: error !== null && errors.length === 0 ? inWords(error) : null,
    retry: () => void query.refetch(),
  };
}
