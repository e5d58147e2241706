import type { Estimate } from '#shared/contracts/estimates.ts';
import { formatComposed } from '#shared/units/format.ts';
import { useEditing } from '../editing/editor-context.ts';
import { Explain, MeaningDialog } from './explain.tsx';
import { meaningOfFigure } from './model/meaning-figure.ts';
import type { FigureKind } from './model/meaning-figure.ts';

interface FigureMeaningProps {
  kind: FigureKind;
  label: string;
  estimate: Estimate;
}

/** What one of the headline figures is, behind a question mark. */
export function FigureMeaning({ kind, label, estimate }: FigureMeaningProps) {
  const { draft, forms } = useEditing();
  const born = estimate.methods.born1;
  if (!born || 'unavailable' in born) return null;
  const integral = born[kind];
  const value =
    'divergent' in integral ? 'divergent' : formatComposed(integral.value, integral.unit, 10);
  return (
    <Explain
      label={`What is ${label}?`}
      dialog={(close) => {
        const meaning = meaningOfFigure(kind, { estimate, document: draft.document, forms });
        return meaning && <MeaningDialog meaning={meaning} value={value} onClose={close} />;
      }}
    />
  );
}
