import { useQuery } from '@tanstack/react-query';
import type { InteractionDetail, InteractionVersion } from '#shared/contracts/library.ts';
import type { Citation } from '#shared/contracts/estimates.ts';
import { ApiError } from '#src/lib/api.ts';
import { interactionQuery, interactionVersionQuery } from '#src/lib/library.ts';
import { useEditing } from '../editing/editor-context.ts';

export interface Cited {
  citation: Citation;
  newest: InteractionDetail | undefined;
  /** The version that is cited. */
  cited: InteractionVersion | undefined;
  /** The library has no such interaction or version. */
  missing: boolean;
}

const NO_ID = '';

/** What the interaction of the case cites; null where it cites nothing. */
export function useCited(): Cited | null {
  const { draft } = useEditing();
  const { citation } = draft.document.interaction;
  const { id, version } = citation ?? { id: NO_ID, version: 1 };
  const newest = useQuery({ ...interactionQuery(id), enabled: citation !== undefined });
  const older = useQuery({
    ...interactionVersionQuery(id, version),
    enabled: newest.data !== undefined && newest.data.data.newestVersion !== version,
  });
  if (!citation) return null;
  const detail = newest.data?.data;
  const gone = [newest.error, older.error].some(
    (error) => error instanceof ApiError && error.code === 'notFound',
  );
  return {
    citation,
    newest: detail,
    cited: detail?.newestVersion === version ? detail : older.data,
    missing: gone,
  };
}
