import { useMemo, useState } from 'react';
import { Button } from '#src/components/button.tsx';
import { EmptyState } from '#src/components/empty-state.tsx';
import { Notice } from '#src/components/notice.tsx';
import { Skeleton, Waiting } from '#src/components/skeleton.tsx';
import { classNames } from '#src/lib/class-names.ts';
import type { RunPlan, RunPlanBody } from '#shared/contracts/run-plans.ts';
import { WarningList } from '../components/warning-list.tsx';
import { EditingContext, useEditing } from '../editing/editor-context.ts';
import { allProblems } from '../model/problems.ts';
import { without } from '../model/without.ts';
import { Panel } from '../validity/panel.tsx';
import { AimOfRun, UncertaintiesOfRun } from './aim-of-run.tsx';
import { BeamOfRun } from './beam-of-run.tsx';
import { RunCautions } from './cautions.tsx';
import { DetectorDetail } from './detector-detail.tsx';
import { DetectorInputs } from './detector-inputs.tsx';
import { startPlan } from './model/plan.ts';
import { PlanTable } from './plan-table.tsx';
import { PlanVerdict } from './plan-verdict.tsx';
import { TargetOfRun } from './target-of-run.tsx';
import { TopView } from './top-view.tsx';
import { useRunPlan } from './use-run-plan.ts';

function NoPlan() {
  const { editDocument, readOnly } = useEditing();
  return (
    <EmptyState
      title="No run is planned for this case"
      actions={
        !readOnly && (
          <Button
            look="primary"
            onClick={() =>
              editDocument('/runPlan', (document) => ({
                ...document,
                runPlan: startPlan(document),
              }))
            }
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

interface InputsProps {
  plan: RunPlanBody;
  chosen: number;
  onChoose: (index: number) => void;
}

function Inputs({ plan, chosen, onChoose }: InputsProps) {
  const { editDocument, readOnly } = useEditing();
  return (
    <Panel
      title="The run"
      says="Saved with the case. What is left out counts as efficiency 1, dead time 0, duty factor 1, background 0, and the answer says so."
      actions={
        !readOnly && (
          <Button
            size="small"
            look="quiet"
            onClick={() => editDocument('/runPlan', (document) => without(document, 'runPlan'))}
          >
            Leave the plan out
          </Button>
        )
      }
    >
      <fieldset disabled={readOnly} className="@container flex flex-col gap-5">
        <legend className="sr-only">Inputs of the run plan</legend>
        <div className="grid gap-x-8 gap-y-5 @3xl:grid-cols-2">
          <section aria-label="Beam of the run">
            <h3 className="mb-2 font-semibold">Beam</h3>
            <BeamOfRun beam={plan.beam} />
          </section>
          <section aria-label="Target of the run">
            <h3 className="mb-2 font-semibold">Target</h3>
            <TargetOfRun plan={plan} />
          </section>
        </div>
        <section aria-label="Aim of the run">
          <h3 className="mb-2 font-semibold">Aim</h3>
          <AimOfRun plan={plan} />
        </section>
        <UncertaintiesOfRun plan={plan} />
        <section aria-label="Detectors of the run">
          <h3 className="mb-2 font-semibold">Detectors</h3>
          <DetectorInputs plan={plan} chosen={chosen} onChoose={onChoose} />
        </section>
      </fieldset>
    </Panel>
  );
}

interface AnswerProps extends InputsProps {
  answer: RunPlan | undefined;
  stale: boolean;
  fileName: string;
}

function Answer({ plan, answer, stale, fileName, chosen, onChoose }: AnswerProps) {
  const detector = answer?.detectors[Math.min(chosen, answer.detectors.length - 1)];
  return (
    <div
      aria-busy={stale || undefined}
      className={classNames('flex min-w-0 flex-col gap-4', stale && answer && 'stale')}
    >
      {answer && (
        <Panel title="Can it be done?">
          <PlanVerdict plan={answer} />
        </Panel>
      )}
      <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-4 @4xl:grid-cols-[minmax(0,22rem)_minmax(0,1fr)]">
        <Panel title="From above">
          <TopView
            plan={plan}
            answered={answer?.detectors ?? []}
            chosen={chosen}
            onChoose={onChoose}
          />
        </Panel>
        {detector && (
          <Panel title={`Detector ${detector.name}`}>
            <DetectorDetail detector={detector} />
          </Panel>
        )}
      </div>
      {answer && (
        <Panel title="What every detector sees">
          <PlanTable plan={answer} fileName={fileName} chosen={chosen} onChoose={onChoose} />
        </Panel>
      )}
      {answer && <WarningList warnings={answer.warnings} />}
    </div>
  );
}

function Planned({ plan, fileName }: { plan: RunPlanBody; fileName: string }) {
  const editing = useEditing();
  const { document } = editing.draft;
  const [chosen, setChosen] = useState(0);
  const { plan: answer, stale, errors, failure, retry } = useRunPlan(document);
  const inPlan = useMemo(
    () => ({
      ...editing,
      problems: allProblems(
        editing.draft.open,
        errors.filter(({ path }) => path.startsWith('/runPlan')),
      ),
    }),
    [editing, errors],
  );
  const shown = Math.min(chosen, plan.detectors.length - 1);
  const refused = errors.filter(
    ({ path }) => !/^\/runPlan\/(beam|foil|gas|detectors|aim|unc)/.test(path),
  );
  const trouble = failure ?? (editing.problems.length === 0 ? refused[0]?.message : undefined);
  return (
    <EditingContext value={inPlan}>
      <div className="@container flex min-w-0 flex-col gap-4">
        {trouble !== undefined && (
          <Notice
            live
            tone="fault"
            title="The run could not be sized."
            actions={
              <Button size="small" onClick={retry}>
                Try again
              </Button>
            }
          >
            {trouble}
          </Notice>
        )}
        <Inputs plan={plan} chosen={shown} onChoose={setChosen} />
        {!answer && trouble === undefined && errors.length === 0 && (
          <Waiting what="the run plan">
            <Skeleton className="h-60" />
          </Waiting>
        )}
        <Answer
          plan={plan}
          answer={answer}
          stale={stale}
          fileName={fileName}
          chosen={shown}
          onChoose={setChosen}
        />
        <RunCautions />
      </div>
    </EditingContext>
  );
}

/** From the cross section to counts, hours and whether it can be done. */
export function RunPlanSection({ fileName }: { fileName: string }) {
  const { draft } = useEditing();
  const { runPlan } = draft.document;
  return runPlan ? <Planned plan={runPlan} fileName={fileName} /> : <NoPlan />;
}
