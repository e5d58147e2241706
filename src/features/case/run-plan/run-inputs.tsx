import { Button } from '#src/components/button.tsx';
import type { RunPlanBody } from '#shared/contracts/run-plans.ts';
import { useEditing } from '../editing/editor-context.ts';
import { without } from '../model/without.ts';
import { Panel } from '../validity/panel.tsx';
import { AimOfRun, UncertaintiesOfRun } from './aim-of-run.tsx';
import { BeamOfRun } from './beam-of-run.tsx';
import { withoutTexts } from './model/texts.ts';
import { TargetOfRun } from './target-of-run.tsx';

/** Beam, target and aim of the run. */
export function RunInputs({ plan }: { plan: RunPlanBody }) {
  const { edit, readOnly } = useEditing();
  const leaveOut = () =>
    edit('/runPlan', (before) => {
      const clean = withoutTexts(before, /^\/runPlan(\/|$)/);
      return { ...clean, document: without(clean.document, 'runPlan') };
    });
  return (
    <Panel
      title="Beam, target and aim"
      says="Saved with the case. What is left out counts as efficiency 1, dead time 0, duty factor 1, background 0, and the answer says so."
      actions={
        !readOnly && (
          <Button size="small" look="quiet" onClick={leaveOut}>
            Leave the plan out
          </Button>
        )
      }
    >
      <fieldset disabled={readOnly} className="@container flex flex-col gap-5">
        <legend className="sr-only">Inputs of the run plan</legend>
        <div className="grid gap-x-8 gap-y-5 @2xl:grid-cols-2">
          <section aria-label="Beam of the run" className="@container min-w-0">
            <h3 className="mb-2 font-semibold">Beam</h3>
            <BeamOfRun beam={plan.beam} />
          </section>
          <section aria-label="Target of the run" className="@container min-w-0">
            <h3 className="mb-2 font-semibold">Target</h3>
            <TargetOfRun plan={plan} />
          </section>
        </div>
        <section aria-label="Aim of the run" className="@container min-w-0">
          <h3 className="mb-2 font-semibold">Aim</h3>
          <AimOfRun plan={plan} />
        </section>
        <UncertaintiesOfRun plan={plan} />
      </fieldset>
    </Panel>
  );
}
