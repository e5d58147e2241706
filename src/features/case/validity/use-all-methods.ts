import { useMemo } from 'react';
import { METHODS } from '#shared/contracts/estimates.ts';
import { useEditing } from '../editing/editor-context.ts';
import { useLiveEstimate } from '../editing/use-estimate.ts';
import type { LiveEstimate } from '../editing/use-estimate.ts';

/** The case with every method, whatever its document asks for: a question of this section alone, which changes nothing that is saved. */
export function useAllMethods(): LiveEstimate {
  const { draft } = useEditing();
  const asked = useMemo(() => ({ ...draft.document, methods: [...METHODS] }), [draft.document]);
  return useLiveEstimate(asked);
}
