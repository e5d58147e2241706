import { Segmented } from '#src/components/segmented.tsx';
import type { DetectorSent } from '#shared/contracts/run-plans.ts';
import type { Quantity } from '#shared/units/quantity.ts';
import { NumberField, QuantityField } from '../components/typed-fields.tsx';
import { useEditing } from '../editing/editor-context.ts';
import { OPENINGS, openingOf, withOpening } from './model/openings.ts';
import type { OpeningKind } from './model/openings.ts';
import { changeDetector, putInDetector } from './model/plan.ts';
import { withoutTexts } from './model/texts.ts';

const NAMES: Record<OpeningKind, string> = {
  round: 'round',
  annular: 'ring',
  rectangle: 'rectangle',
  solidAngle: 'solid angle',
};
/** 4π sr, rounded down so that what the field allows the engine allows. */
const FULL_SPHERE = 12.56637061;

type Side = 'distance' | 'apertureRadius' | 'innerRadius' | 'width' | 'height';
const SIDES: Record<Side, [string, string]> = {
  distance: ['Distance', 'the distance'],
  apertureRadius: ['Radius of the aperture', 'the radius'],
  innerRadius: ['Radius of its hole', 'the inner radius'],
  width: ['Width, in the plane', 'the width'],
  height: ['Height, across it', 'the height'],
};
const SIDES_OF: Record<Exclude<OpeningKind, 'solidAngle'>, readonly Side[]> = {
  round: ['distance', 'apertureRadius'],
  annular: ['distance', 'apertureRadius', 'innerRadius'],
  rectangle: ['distance', 'width', 'height'],
};

interface OpeningProps {
  detector: DetectorSent;
  at: string;
  index: number;
}

function Length({ side, at, index, value }: OpeningProps & { side: Side; value?: Quantity }) {
  const [label, name] = SIDES[side];
  return (
    <QuantityField
      pointer={`${at}/${side}`}
      label={label}
      name={name}
      dimension="length"
      value={value}
      fallbackUnit="mm"
      put={putInDetector(index, side)}
    />
  );
}

/** What a detector sees of the sphere: an aperture at a distance, or a solid angle. */
export function OpeningInputs(props: OpeningProps) {
  const { detector, at, index } = props;
  const { edit, readOnly } = useEditing();
  const kind = openingOf(detector);
  const choose = (next: OpeningKind) =>
    edit(`${at}/opening ${next}`, (before) => {
      const gone = 'distance|apertureRadius|innerRadius|width|height|solidAngle';
      const clean = withoutTexts(before, new RegExp(`^${at}/(${gone})$`));
      return {
        ...clean,
        document: changeDetector(clean.document, index, (one) => withOpening(one, next)),
      };
    });
  return (
    <>
      <div className="col-span-full">
        <Segmented
          label={`How the opening of ${detector.name} is given`}
          value={kind}
          choices={OPENINGS.map((value) => ({ value, label: NAMES[value] }))}
          onChange={(next) => !readOnly && choose(next)}
        />
      </div>
      {kind === 'solidAngle' ? (
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
        SIDES_OF[kind].map((side) => {
          const value = detector[side];
          return <Length key={side} {...props} side={side} {...(value && { value })} />;
        })
      )}
    </>
  );
}
