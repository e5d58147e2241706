import { keepPreviousData, useQuery } from '@tanstack/react-query';
import type { Estimate } from '#shared/contracts/estimates.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import type { FieldError } from '#shared/errors.ts';
import { ApiError, inWords } from '#src/lib/api.ts';
import { potentialQuery } from '../api.ts';
import type { PotentialUnits } from '../api.ts';
import { useSettled } from './use-estimate.ts';

const PAUSE_MS = 200;

export interface LivePotential {
  potential: Estimate['potential'] | undefined;
  /** True while the curve is not that of the term shown. */
  stale: boolean;
  /** Faults of the term, their pointers below it. */
  errors: readonly FieldError[];
  failure: string | null;
}

/** Points of V(r) of one term, from the server: the browser evaluates no potential. */
export function usePotential(
  term: InteractionTerm | null,
  units: PotentialUnits | undefined,
): LivePotential {
  const settled = useSettled(term, PAUSE_MS);
  const query = useQuery({
    ...potentialQuery(settled ?? { form: '' }, units),
    enabled: settled !== null,
    placeholderData: keepPreviousData,
  });
  const error = settled === null ? null : query.error;
  const errors = error instanceof ApiError ? error.errors : [];
  return {
    potential: settled === null ? undefined : query.data,
    stale: query.isPlaceholderData || settled !== term || error !== null,
    errors,
    failure: error !== null && errors.length === 0 ? inWords(error) : null,
  };
}
