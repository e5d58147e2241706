import { DEAD_TIME_MODELS } from '#shared/contracts/run-plans.ts';
import type { DetectorSent } from '#shared/contracts/run-plans.ts';
import { ChoiceField } from '../components/choice-field.tsx';
import { NumberField, QuantityField } from '../components/typed-fields.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { changeDetector, putInDetector } from './model/plan.ts';

const MODEL_NAMES = { nonParalysable: 'non-paralysable', paralysable: 'paralysable' } as const;

/** How a detector counts. */
export function CounterInputs({
  detector,
  at,
  index,
}: {
  detector: DetectorSent;
  at: string;
  index: number;
}) {
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
        hint="Without the target, at any time."
        name="the background"
        dimension="rate"
        value={detector.backgroundRate}
        fallbackUnit="1/s"
        put={putInDetector(index, 'backgroundRate')}
      />
      <QuantityField
        optional
        pointer={`${at}/beamBackgroundRate`}
        label="Background of the beam"
        name="the background of the beam"
        dimension="rate"
        value={detector.beamBackgroundRate}
        fallbackUnit="1/s"
        put={putInDetector(index, 'beamBackgroundRate')}
        hint="Without the target, with this beam on."
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
