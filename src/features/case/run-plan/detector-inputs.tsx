import { useState } from 'react';
import { Plus, Trash2 } from 'lucide-react';
import { Button, IconButton } from '#src/components/button.tsx';
import { Select } from '#src/components/select.tsx';
import { MAX_DETECTORS } from '#shared/contracts/run-plans.ts';
import type { RunPlanBody } from '#shared/contracts/run-plans.ts';
import { NumberField } from '../components/typed-fields.tsx';
import { useEditing } from '../editing/editor-context.ts';
import type { Draft } from '../model/editor.ts';
import { addDetector, allLike, putInDetector, removeDetector, withPlan } from './model/plan.ts';
import { withoutDetectorTexts, withoutTexts } from './model/texts.ts';
import { CounterInputs } from './counter-inputs.tsx';
import { OpeningInputs } from './opening-inputs.tsx';
import { SeriesDialog } from './series-dialog.tsx';
import { TextOfPlan } from './text-of-plan.tsx';

const OPENING_AND_COUNTER = /^\/runPlan\/detectors\/\d+\/(?!name$|angle$)/;

interface ListProps {
  plan: RunPlanBody;
  chosen: number;
  onChoose: (index: number) => void;
}

/** Which detector is looked at, and the way to more or fewer of them. */
function DetectorList({ plan, chosen, onChoose }: ListProps) {
  const { edit, readOnly, problems } = useEditing();
  const [asking, setAsking] = useState(false);
  const detector = plan.detectors[chosen];
  const change = (step: string, next: (draft: Draft) => Draft) =>
    edit(`/runPlan/detectors ${step}`, next);
  const inPlan = (draft: Draft, next: (plan: RunPlanBody) => RunPlanBody): Draft => ({
    ...draft,
    document: withPlan(draft.document, next),
  });
  const faulty = (index: number) =>
    problems.some(({ path }) => path.startsWith(`/runPlan/detectors/${index}/`));
  return (
    <div className="flex flex-wrap items-center gap-2">
      {plan.detectors.length > 1 && (
        <span className="w-36">
          <Select
            aria-label="Detector"
            value={String(chosen)}
            choices={plan.detectors.map(({ name }, index) => ({
              value: String(index),
              label: faulty(index) ? `${name}: needs mending` : name,
            }))}
            onChange={(index) => onChoose(Number(index))}
          />
        </span>
      )}
      <Button
        size="small"
        disabled={readOnly || plan.detectors.length >= MAX_DETECTORS}
        onClick={() => {
          change(`add ${plan.detectors.length}`, (before) => inPlan(before, addDetector));
          onChoose(plan.detectors.length);
        }}
      >
        <Plus aria-hidden="true" className="size-4" /> Add a detector
      </Button>
      <Button size="small" disabled={readOnly} onClick={() => setAsking(true)}>
        Angle series …
      </Button>
      {detector && plan.detectors.length > 1 && (
        <>
          <Button
            size="small"
            disabled={readOnly}
            onClick={() =>
              change(`like ${chosen}`, (before) =>
                inPlan(withoutTexts(before, OPENING_AND_COUNTER), (now) => allLike(now, chosen)),
              )
            }
          >
            All like {detector.name}
          </Button>
          <IconButton
            label={`Remove ${detector.name}`}
            disabled={readOnly}
            onClick={() => {
              change(`remove ${plan.detectors.length}`, (before) =>
                inPlan(withoutDetectorTexts(before, chosen), (now) => removeDetector(now, chosen)),
              );
              onChoose(Math.max(0, chosen - 1));
            }}
          >
            <Trash2 aria-hidden="true" className="size-4" />
          </IconButton>
        </>
      )}
      {asking && (
        <SeriesDialog
          onClose={() => setAsking(false)}
          onMake={(next) => {
            change('series', (before) =>
              inPlan(withoutTexts(before, /^\/runPlan\/detectors\//), next),
            );
            onChoose(0);
            setAsking(false);
          }}
        />
      )}
    </div>
  );
}

/** The detector that is chosen: where it stands, what it sees through, how it counts. */
export function DetectorInputs(props: ListProps) {
  const { plan, chosen } = props;
  const detector = plan.detectors[chosen];
  const at = `/runPlan/detectors/${chosen}`;
  return (
    <div className="flex flex-col gap-3">
      <DetectorList {...props} />
      {detector && (
        <div className="grid items-start gap-3 @xs:grid-cols-2">
          <TextOfPlan
            pointer={`${at}/name`}
            label="Name"
            value={detector.name}
            longest={40}
            put={putInDetector(chosen, 'name')}
          />
          <NumberField
            pointer={`${at}/angle`}
            label="Angle, lab"
            suffix="°"
            value={detector.angle}
            rules={{ minimum: -180, maximum: 180, what: 'The angle' }}
            put={putInDetector(chosen, 'angle')}
          />
          <OpeningInputs detector={detector} at={at} index={chosen} />
          <CounterInputs detector={detector} at={at} index={chosen} />
        </div>
      )}
    </div>
  );
}
