import { useEditing } from '../editing/editor-context.ts';
import { useAidsState } from './aids-context.ts';
import { mayHaveCharges } from './model/charges.ts';
import type { PointCharges } from './model/ratio.ts';
import { useLiveAids } from './use-aids.ts';

export interface Ratio {
  /** Whether a ratio to two point charges makes sense here. */
  offered: boolean;
  /** Whether it is what the plot shows. */
  on: boolean;
  setOn: (on: boolean) => void;
  reference: PointCharges | null;
  stale: boolean;
  /** Why there is none, in words. */
  reason: string | null;
}

/** The ratio of the curve to that of two point charges, asked for once it is to be shown. */
export function useRatio(): Ratio {
  const { draft } = useEditing();
  const { ratio: wanted, setRatio } = useAidsState();
  const offered = mayHaveCharges(draft.document);
  const on = offered && wanted;
  const { aids, stale, failure } = useLiveAids({ reference: true }, { enabled: on });
  const answer = on ? aids?.reference : undefined;
  const refused = answer && 'unavailable' in answer ? answer.reason : null;
  return {
    offered,
    on,
    setOn: setRatio,
    reference: answer && !('unavailable' in answer) ? answer : null,
    stale: on && stale,
    reason: on ? (failure ?? refused) : null,
  };
}
