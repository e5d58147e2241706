import type { Estimate } from '#shared/contracts/estimates.ts';
import { useEditing } from '../editing/editor-context.ts';
import { treatmentOf } from './model/treatment.ts';

/** How identity and spin stand in the numbers, in a line below them. */
export function Treatment({ estimate }: { estimate: Estimate }) {
  const { draft } = useEditing();
  const sentences = treatmentOf(draft.document, estimate);
  if (sentences.length === 0) return null;
  return (
    <p aria-label="Identity and spin" role="note" className="px-1 text-sm text-muted">
      {sentences.join(' ')}
    </p>
  );
}
