import { Button } from '#src/components/button.tsx';
import { EmptyState } from '#src/components/empty-state.tsx';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { useEditing } from '../editing/editor-context.ts';
import { withEntered } from '../model/entered.ts';
import { computedMethods } from '../validity/model/methods.ts';
import { startPlan } from './model/plan.ts';

/** The document with a first plan, its thin target written as a person would write it. */
function planned(document: CaseDocument, estimate: Estimate | undefined): CaseDocument {
  const elastic = estimate && computedMethods(estimate)[0]?.result.elastic;
  const runPlan = startPlan(document, elastic && 'value' in elastic ? elastic : null);
  const areal = runPlan.foil?.arealDensity;
  const text = areal && `${areal.value.toExponential().replace('+', '')} ${areal.unit}`;
  return text
    ? withEntered({ ...document, runPlan }, '/runPlan/foil/arealDensity', text)
    : { ...document, runPlan };
}

/** A case whose run nobody has planned yet. */
export function NoPlan() {
  const { editDocument, estimate, readOnly } = useEditing();
  return (
    <EmptyState
      title="No run is planned for this case"
      actions={
        !readOnly && (
          <Button
            look="primary"
            onClick={() => editDocument('/runPlan', (document) => planned(document, estimate))}
          >
            Plan a run
          </Button>
        )
      }
    >
      A run plan says what each detector will count with this cross section, how long a position
      takes, and whether it can be done: beam, target, detectors, and the precision to reach.
    </EmptyState>
  );
}
