import type { PlannedDetector, RunPlan } from '#shared/contracts/run-plans.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { fullDigits } from '#shared/units/format.ts';

type Unavailable = { unavailable: true; reason: string };

const given = (entry: { value: number } | Unavailable): string =>
  'unavailable' in entry ? '' : fullDigits(entry.value);

function rowOf(detector: PlannedDetector, factor: number): string[] {
  const { averagedDcs, pointDcs, timeForPrecision: time } = detector;
  const times =
    'unavailable' in time
      ? ['', '', '']
      : [time.signal, time.blank, time.total].map(({ value }) => fullDigits(value));
  return [
    detector.name,
    fullDigits(detector.angle),
    fullDigits(detector.solidAngle),
    averagedDcs ? fullDigits(averagedDcs.value * factor) : '',
    pointDcs ? fullDigits(pointDcs.value * factor) : '',
    fullDigits(detector.trueRate.value),
    fullDigits(detector.observedRate.value),
    fullDigits(detector.deadTimeFraction),
    fullDigits(detector.backgroundRate.value),
    ...times,
    given(detector.decisionThreshold),
    given(detector.detectionLimit),
    fullDigits(detector.combined),
  ];
}

/** Names, units, then one row a detector, with all digits. */
export function planRows(plan: RunPlan, area: string): string[][] {
  const from = plan.detectors.find(({ averagedDcs }) => averagedDcs)?.averagedDcs?.unit;
  const factor = from === undefined ? 1 : composedFactor(from, `${area}/sr`);
  return [
    [
      'detector',
      'angle (lab)',
      'solid angle',
      'averaged dcs (lab)',
      'dcs at the centre (lab)',
      'true rate',
      'observed rate',
      'dead-time fraction',
      'background rate',
      'signal time',
      'blank time',
      'total time',
      'decision threshold',
      'detection limit',
      'combined relative uncertainty of the inputs',
    ],
    [
      '',
      'deg',
      'sr',
      `${area}/sr`,
      `${area}/sr`,
      '1/s',
      '1/s',
      '1',
      '1/s',
      's',
      's',
      's',
      '1/s',
      '1/s',
      '1',
    ],
    ...plan.detectors.map((detector) => rowOf(detector, factor)),
  ];
}
