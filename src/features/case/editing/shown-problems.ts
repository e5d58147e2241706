import { useMemo } from 'react';
import type { FieldError } from '#shared/errors.ts';
import { useSettled } from './use-estimate.ts';

/** Long enough to finish a word: `10 k` on the way to `10 keV` is no fault yet. */
export const WORD_MS = 350;
/** What moves the page waits until the person has stopped. */
export const REST_MS = 900;

/** Faults that have stood for a while. A mended one is gone at once. */
export function useShownProblems(
  problems: readonly FieldError[],
  pause: number,
): readonly FieldError[] {
  const settled = useSettled(problems, pause);
  return useMemo(
    () => problems.filter(({ path }) => settled.some((fault) => fault.path === path)),
    [problems, settled],
  );
}
