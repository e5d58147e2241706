import { keepPreviousData, queryOptions, useQuery } from '@tanstack/react-query';
import { materialAidsSchema } from '#shared/contracts/material-aids.ts';
import type { MaterialAids, MaterialAidsRequest } from '#shared/contracts/material-aids.ts';
import { materialsTableSchema } from '#shared/contracts/reference.ts';
import type { FieldError } from '#shared/errors.ts';
import { ApiError, inWords, request } from '#src/lib/api.ts';
import { estimateBody } from '../api.ts';
import { useEditing } from '../editing/editor-context.ts';
import { useSettled } from '../editing/use-estimate.ts';

/** The table of materials, whole: about fifty rows. */
export const materialsQuery = queryOptions({
  queryKey: ['materials', 'all'],
  queryFn: async ({ signal }) =>
    (
      await request('/api/reference/materials', {
        answer: materialsTableSchema,
        query: { pageSize: 200 },
        signal,
      })
    ).items,
  staleTime: Infinity,
});

export type MaterialQuestion = Omit<MaterialAidsRequest, 'estimate'>;

function materialAidsQuery(body: MaterialAidsRequest) {
  return queryOptions({
    queryKey: ['material-aids', body],
    queryFn: ({ signal }) =>
      request('/api/material-aids', { method: 'POST', body, answer: materialAidsSchema, signal }),
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    gcTime: 60_000,
  });
}

export interface LiveMaterial {
  aids: MaterialAids | undefined;
  stale: boolean;
  /** What is wrong with the question, field by field. */
  errors: readonly FieldError[];
  /** A failure that no field here is to blame for. */
  failure: string | null;
}

const PAUSE_MS = 250;

/** The case in a material, following the inputs; nothing is asked while there is no question. */
export function useLiveMaterial(question: MaterialQuestion | null): LiveMaterial {
  const { draft } = useEditing();
  const document = useSettled(draft.document, PAUSE_MS);
  const asked = useSettled(question, PAUSE_MS);
  const query = useQuery({
    ...materialAidsQuery({
      estimate: estimateBody(document),
      ...(asked ?? { material: { key: '' } }),
    }),
    enabled: asked !== null,
  });
  const { error } = query;
  const errors = error instanceof ApiError ? error.errors : [];
  const here = errors.filter(({ path }) => !path.startsWith('/estimate'));
  return {
    aids: question === null || error !== null ? undefined : query.data,
    stale: query.isPlaceholderData || query.isFetching || asked !== question,
    errors: here,
    failure: error !== null && here.length === 0 ? inWords(error) : null,
  };
}
