import type { DetectorSent } from '#shared/contracts/run-plans.ts';
import { without } from '../../model/without.ts';

export const OPENINGS = ['round', 'annular', 'rectangle', 'solidAngle'] as const;
export type OpeningKind = (typeof OPENINGS)[number];

const mm = (value: number) => ({ value, unit: 'mm' });

type Opening = Pick<
  DetectorSent,
  'distance' | 'apertureRadius' | 'innerRadius' | 'width' | 'height' | 'solidAngle'
>;
const STARTS: Record<OpeningKind, Opening> = {
  round: { distance: mm(100), apertureRadius: mm(5) },
  annular: { distance: mm(100), apertureRadius: mm(10), innerRadius: mm(5) },
  rectangle: { distance: mm(100), width: mm(10), height: mm(10) },
  solidAngle: { solidAngle: 1e-3 },
};

/** By what is given: a side that is missing is asked for at its field. */
export function openingOf({ solidAngle, width, height, innerRadius }: DetectorSent): OpeningKind {
  if (solidAngle !== undefined) return 'solidAngle';
  if (width ?? height) return 'rectangle';
  return innerRadius ? 'annular' : 'round';
}

/** Another kind of opening, at the distance there was. */
export function withOpening(detector: DetectorSent, kind: OpeningKind): DetectorSent {
  const { distance } = detector;
  const start = STARTS[kind];
  const rest = without(
    detector,
    'distance',
    'apertureRadius',
    'innerRadius',
    'width',
    'height',
    'solidAngle',
  );
  return {
    ...rest,
    ...start,
    ...(distance && start.distance && { distance }),
    name: detector.name,
    angle: detector.angle,
  };
}
