import { useMemo, useState } from 'react';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { classNames } from '#src/lib/class-names.ts';
import type { RunPlan, RunPlanBody } from '#shared/contracts/run-plans.ts';
import { EditingContext, useEditing } from '../editing/editor-context.ts';
import type { Editing } from '../editing/editor-context.ts';
import { REST_MS, WORD_MS, useShownProblems } from '../editing/shown-problems.ts';
import { allProblems } from '../model/problems.ts';
import { Panel } from '../validity/panel.tsx';
import { RunCautions } from './cautions.tsx';
import { DetectorDetail } from './detector-detail.tsx';
import { DetectorInputs } from './detector-inputs.tsx';
import { ContributionsPanel } from './contributions-panel.tsx';
import { NeededPanel } from './needed-panel.tsx';
import { NoPlan } from './no-plan.tsx';
import { PlanFaults } from './plan-faults.tsx';
import { PlanInWords } from './plan-in-words.tsx';
import { PlanTable } from './plan-table.tsx';
import { PlanVerdict } from './plan-verdict.tsx';
import { PlanWarnings } from './plan-warnings.tsx';
import { RunInputs } from './run-inputs.tsx';
import { RunSheet } from './run-sheet.tsx';
import { TargetChecks } from './target-checks.tsx';
import { TopView } from './top-view.tsx';
import { useRunPlan } from './use-run-plan.ts';
import type { LiveRunPlan } from './use-run-plan.ts';

interface PartProps {
  plan: RunPlanBody;
  answer: RunPlan | undefined;
  stale: boolean;
  fileName: string;
  chosen: number;
  onChoose: (index: number) => void;
}

const dimmed = ({ stale, answer }: PartProps) => ({
  'aria-busy': stale || undefined,
  className: classNames('flex min-w-0 flex-col gap-4', stale && answer && 'stale'),
});

/** Where the detectors stand, drawn and in fields, side by side where there is room. */
function Detectors({ plan, answer, chosen, onChoose }: PartProps) {
  const choose = { plan, chosen, onChoose };
  return (
    <Panel title="Detectors of the run">
      <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-x-6 gap-y-4 @2xl:grid-cols-[minmax(0,1fr)_minmax(0,1.25fr)]">
        <TopView {...choose} answered={answer?.detectors ?? []} />
        <section aria-label="The chosen detector" className="@container min-w-0 print:hidden">
          <DetectorInputs {...choose} />
        </section>
      </div>
    </Panel>
  );
}

function Answer(props: PartProps & { answer: RunPlan }) {
  const { answer, fileName, chosen, onChoose } = props;
  const detector = answer.detectors[Math.min(chosen, answer.detectors.length - 1)];
  return (
    <div {...dimmed(props)}>
      <Panel title="What every detector sees">
        <PlanTable plan={answer} fileName={fileName} chosen={chosen} onChoose={onChoose} />
      </Panel>
      {detector && (
        <Panel title={`Detector ${detector.name}`}>
          <DetectorDetail detector={detector} />
        </Panel>
      )}
      <NeededPanel plan={answer} />
      <RunSheet plan={props.plan} answer={answer} fileName={fileName} />
      <ContributionsPanel plan={props.plan} answer={answer} />
      <TargetChecks plan={answer} />
      <PlanWarnings warnings={answer.warnings} />
    </div>
  );
}

/** Faults of the plan belong to its fields here, beside those that the page knows of. */
function useEditingOfPlan({ errors }: LiveRunPlan) {
  const editing = useEditing();
  const { open } = editing.draft;
  const all = useMemo(
    () =>
      allProblems(
        open,
        errors.filter(({ path }) => path.startsWith('/runPlan')),
      ),
    [open, errors],
  );
  const problems = useShownProblems(all, WORD_MS);
  return useMemo<Editing>(() => ({ ...editing, problems }), [editing, problems]);
}

interface PlannedProps {
  plan: RunPlanBody;
  saved: RunPlan | undefined;
  fileName: string;
}

function Planned({ plan, saved, fileName }: PlannedProps) {
  const { draft, problems } = useEditing();
  const [chosen, setChosen] = useState(0);
  const live = useRunPlan(draft.document, saved);
  const editing = useEditingOfPlan(live);
  const { plan: answer, stale } = live;
  // What stands in the fields of the case, and texts that are no values, is said above all sections.
  const refused = useShownProblems(problems.length === 0 ? live.errors : [], REST_MS);
  const shown = Math.min(chosen, plan.detectors.length - 1);
  const parts: PartProps = { plan, answer, stale, fileName, chosen: shown, onChoose: setChosen };
  const waiting = !answer && live.failure === null && live.errors.length === 0;
  return (
    <EditingContext value={editing}>
      <div className="@container flex min-w-0 flex-col gap-4">
        <PlanFaults
          plan={plan}
          faults={refused}
          failure={live.failure}
          kept={answer !== undefined}
          onRetry={live.retry}
          onDetector={setChosen}
        />
        {answer && (
          <div {...dimmed(parts)}>
            <Panel title="Can it be done?">
              <PlanVerdict plan={answer} />
            </Panel>
          </div>
        )}
        {waiting && (
          <Waiting what="the run plan">
            <Skeleton className="h-40" />
          </Waiting>
        )}
        <div className="print:hidden">
          <RunInputs plan={plan} />
        </div>
        <PlanInWords plan={plan} />
        <Detectors {...parts} />
        {answer && <Answer {...parts} answer={answer} />}
        <RunCautions />
      </div>
    </EditingContext>
  );
}

interface RunPlanSectionProps {
  fileName: string;
  /** The result a version was saved with; it is shown instead of a new one. */
  saved?: RunPlan | undefined;
}

/** From the cross section to counts, hours and whether it can be done. */
export function RunPlanSection({ fileName, saved }: RunPlanSectionProps) {
  const { draft } = useEditing();
  const { runPlan } = draft.document;
  return runPlan ? <Planned plan={runPlan} saved={saved} fileName={fileName} /> : <NoPlan />;
}
