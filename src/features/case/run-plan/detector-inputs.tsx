import { useState } from 'react';
import { Plus, Trash2 } from 'lucide-react';
import { Button, IconButton } from '#src/components/button.tsx';
import { Select } from '#src/components/select.tsx';
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
  allLike,
  changeDetector,
  putInDetector,
  removeDetector,
  withPlan,
} from './model/plan.ts';
import { withoutDetectorTexts, withoutTexts } from './model/texts.ts';
import { SeriesDialog } from './series-dialog.tsx';
import { TextOfPlan } from './text-of-plan.tsx';

const OPENING_AND_COUNTER = /^\/runPlan\/detectors\/\d+\/(?!name$|angle$)/;
/** 4π sr, rounded down so that what the field allows the engine allows. */
const FULL_SPHERE = 12.56637061;
const MODEL_NAMES = { nonParalysable: 'non-paralysable', paralysable: 'paralysable' } as const;

function Opening({ detector, at, index }: { detector: DetectorSent; at: string; index: number }) {
  const { edit, readOnly } = useEditing();
  const bare = detector.solidAngle !== undefined;
  const choose = (kind: 'aperture' | 'solidAngle') =>
    edit(`${at}/opening ${kind}`, (before) => {
      const clean = withoutTexts(
        before,
        new RegExp(`^${at}/(distance|apertureRadius|solidAngle)$`),
      );
      return {
        ...clean,
        document: changeDetector(clean.document, index, (one) => ({
          ...without(one, 'distance', 'apertureRadius', 'solidAngle'),
          ...(kind === 'aperture'
            ? { distance: FIRST_DETECTOR.distance, apertureRadius: FIRST_DETECTOR.apertureRadius }
            : { solidAngle: 1e-3 }),
          name: one.name,
          angle: one.angle,
        })),
      };
    });
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
          rules={{
            minimum: 0,
            exclusiveMinimum: true,
            maximum: FULL_SPHERE,
            what: 'The solid angle',
          }}
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
          <Opening detector={detector} at={at} index={chosen} />
          <Counting detector={detector} at={at} index={chosen} />
        </div>
      )}
    </div>
  );
}
