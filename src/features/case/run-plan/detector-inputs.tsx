import { useState } from 'react';
import { Plus, Trash2 } from 'lucide-react';
import { Button, IconButton } from '#src/components/button.tsx';
import { Segmented } from '#src/components/segmented.tsx';
import { DEAD_TIME_MODELS, MAX_DETECTORS } from '#shared/contracts/run-plans.ts';
import type { DetectorSent, RunPlanBody } from '#shared/contracts/run-plans.ts';
import { ChoiceField } from '../components/choice-field.tsx';
import { NumberField, QuantityField } from '../components/typed-fields.tsx';
import { useEditing } from '../editing/editor-context.ts';
import type { Draft } from '../model/editor.ts';
import { without } from '../model/without.ts';
import {
  FIRST_DETECTOR,
  addDetector,
  changeDetector,
  putInDetector,
  withPlan,
} from './model/plan.ts';
import { SeriesDialog } from './series-dialog.tsx';
import { TextOfPlan } from './text-of-plan.tsx';

const MODEL_NAMES = { nonParalysable: 'non-paralysable', paralysable: 'paralysable' } as const;

/** Numbers of detectors move when one goes: texts that are no values yet go with them. */
export function withoutDetectorTexts(draft: Draft): Draft {
  const open = Object.entries(draft.open).filter(([key]) => !key.startsWith('/runPlan/detectors'));
  const { entered } = draft.document;
  const kept = Object.entries(entered ?? {}).filter(
    ([key]) => !key.startsWith('/runPlan/detectors'),
  );
  const document = entered
    ? { ...draft.document, entered: Object.fromEntries(kept) }
    : draft.document;
  return { ...draft, document, open: Object.fromEntries(open) };
}

function Opening({ detector, at, index }: { detector: DetectorSent; at: string; index: number }) {
  const { edit, readOnly } = useEditing();
  const bare = detector.solidAngle !== undefined;
  const choose = (kind: 'aperture' | 'solidAngle') =>
    edit(`${at}/opening`, (before) => ({
      ...before,
      document: changeDetector(before.document, index, (one) => ({
        ...without(one, 'distance', 'apertureRadius', 'solidAngle'),
        ...(kind === 'aperture'
          ? { distance: FIRST_DETECTOR.distance, apertureRadius: FIRST_DETECTOR.apertureRadius }
          : { solidAngle: 1e-3 }),
        name: one.name,
        angle: one.angle,
      })),
    }));
  return (
    <>
      <div className="col-span-full">
        <Segmented
          label={`How the opening of ${detector.name} is given`}
          value={bare ? 'solidAngle' : 'aperture'}
          choices={[
            { value: 'aperture', label: 'round aperture' },
            { value: 'solidAngle', label: 'solid angle' },
          ]}
          onChange={(kind) => !readOnly && choose(kind)}
        />
      </div>
      {bare ? (
        <NumberField
          pointer={`${at}/solidAngle`}
          label="Solid angle"
          suffix="sr"
          value={detector.solidAngle}
          rules={{ minimum: 0, exclusiveMinimum: true, maximum: 4 * Math.PI, what: 'It' }}
          put={putInDetector(index, 'solidAngle')}
        />
      ) : (
        <>
          <QuantityField
            pointer={`${at}/distance`}
            label="Distance"
            name="the distance"
            dimension="length"
            value={detector.distance}
            fallbackUnit="mm"
            put={putInDetector(index, 'distance')}
          />
          <QuantityField
            pointer={`${at}/apertureRadius`}
            label="Radius of the aperture"
            name="the radius"
            dimension="length"
            value={detector.apertureRadius}
            fallbackUnit="mm"
            put={putInDetector(index, 'apertureRadius')}
          />
        </>
      )}
    </>
  );
}

function Counting({ detector, at, index }: { detector: DetectorSent; at: string; index: number }) {
  const { editDocument } = useEditing();
  return (
    <>
      <NumberField
        optional
        pointer={`${at}/efficiency`}
        label="Efficiency"
        value={detector.efficiency}
        rules={{ minimum: 0, exclusiveMinimum: true, maximum: 1, what: 'The efficiency' }}
        put={putInDetector(index, 'efficiency')}
      />
      <QuantityField
        optional
        pointer={`${at}/backgroundRate`}
        label="Background"
        name="the background"
        dimension="rate"
        value={detector.backgroundRate}
        fallbackUnit="1/s"
        put={putInDetector(index, 'backgroundRate')}
      />
      <QuantityField
        optional
        pointer={`${at}/deadTime`}
        label="Dead time"
        name="the dead time"
        dimension="time"
        value={detector.deadTime}
        fallbackUnit="us"
        put={putInDetector(index, 'deadTime')}
      />
      <ChoiceField
        pointer={`${at}/deadTimeModel`}
        label="Model of the dead time"
        value={detector.deadTimeModel ?? 'nonParalysable'}
        choices={DEAD_TIME_MODELS.map((value) => ({ value, label: MODEL_NAMES[value] }))}
        onChange={(deadTimeModel) =>
          editDocument(`${at}/deadTimeModel`, (document) =>
            changeDetector(document, index, (one) => ({ ...one, deadTimeModel })),
          )
        }
      />
    </>
  );
}

interface DetectorInputsProps {
  plan: RunPlanBody;
  chosen: number;
  onChoose: (index: number) => void;
}

/** The detector that is chosen, and the way to more of them. */
export function DetectorInputs({ plan, chosen, onChoose }: DetectorInputsProps) {
  const { edit, readOnly } = useEditing();
  const [asking, setAsking] = useState(false);
  const detector = plan.detectors[chosen];
  const at = `/runPlan/detectors/${chosen}`;
  const change = (next: (plan: RunPlanBody) => RunPlanBody) =>
    edit('/runPlan/detectors', (before) => {
      const clean = withoutDetectorTexts(before);
      return { ...clean, document: withPlan(clean.document, next) };
    });
  return (
    <div className="flex flex-col gap-3">
      <div className="flex flex-wrap items-center gap-2">
        <Button
          size="small"
          disabled={readOnly || plan.detectors.length >= MAX_DETECTORS}
          onClick={() => {
            change(addDetector);
            onChoose(plan.detectors.length);
          }}
        >
          <Plus aria-hidden="true" className="size-4" /> Add a detector
        </Button>
        <Button size="small" disabled={readOnly} onClick={() => setAsking(true)}>
          Angle series …
        </Button>
        {detector && plan.detectors.length > 1 && (
          <IconButton
            label={`Remove ${detector.name}`}
            disabled={readOnly}
            onClick={() => {
              change((before) => ({
                ...before,
                detectors: before.detectors.filter((_, i) => i !== chosen),
              }));
              onChoose(Math.max(0, chosen - 1));
            }}
          >
            <Trash2 aria-hidden="true" className="size-4" />
          </IconButton>
        )}
      </div>
      {detector && (
        <div className="grid grid-cols-2 gap-3 @lg:grid-cols-4">
          <TextOfPlan
            pointer={`${at}/name`}
            label="Name"
            value={detector.name}
            put={(document, name) =>
              name ? putInDetector(chosen, 'name')(document, name) : document
            }
          />
          <NumberField
            pointer={`${at}/angle`}
            label="Angle, lab"
            suffix="°"
            value={detector.angle}
            rules={{ minimum: -180, maximum: 180, what: 'The angle' }}
            put={putInDetector(chosen, 'angle')}
          />
          <Opening detector={detector} at={at} index={chosen} />
          <Counting detector={detector} at={at} index={chosen} />
        </div>
      )}
      {asking && (
        <SeriesDialog
          onClose={() => setAsking(false)}
          onMake={(next) => {
            change(next);
            onChoose(0);
            setAsking(false);
          }}
        />
      )}
    </div>
  );
}
