import { Plus } from 'lucide-react';
import { Button } from '#src/components/button.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { CitedLine } from '../library/cited-line.tsx';
import { LibraryDeeds } from '../library/library-deeds.tsx';
import { addTerm, defaultTerm } from '../model/terms.ts';
import { CorrectionField } from './correction-field.tsx';
import { TermInputs } from './term-inputs.tsx';

export const MOST_TERMS = 12;

export function InteractionInputs() {
  const { draft, forms, editDocument, readOnly } = useEditing();
  const { terms } = draft.document.interaction;
  const next = forms.find(({ key }) => key === 'gaussian') ?? forms[0];
  return (
    <>
      <CitedLine />
      {terms.map((term, index) => (
        <div
          key={index}
          className={index > 0 ? 'border-t border-dashed border-edge pt-3' : undefined}
        >
          <TermInputs term={term} index={index} several={terms.length > 1} />
        </div>
      ))}
      <CorrectionField />
      <div className="flex flex-wrap gap-2 empty:hidden">
        {!readOnly && next && (
          <Button
            size="small"
            disabled={terms.length >= MOST_TERMS}
            onClick={() =>
              editDocument('/interaction/terms', (document) => addTerm(document, defaultTerm(next)))
            }
          >
            <Plus aria-hidden="true" className="size-4" /> Add a term
          </Button>
        )}
        <LibraryDeeds />
      </div>
    </>
  );
}
