import type { Warning } from '#shared/contracts/estimates.ts';
import type { DetectorSent, RunPlanRequest } from '#shared/contracts/run-plans.ts';
import { DEFAULT_PRECISION } from './to-plan.ts';

const DEFAULTS: readonly {
  key: 'efficiency' | 'deadTime' | 'backgroundRate';
  code: string;
  words: string;
}[] = [
  {
    key: 'efficiency',
    code: 'efficiencyAssumed',
    words: 'an efficiency of 1 is taken: every particle that enters is counted',
  },
  {
    key: 'deadTime',
    code: 'deadTimeAssumed',
    words: 'a dead time of 0 is taken: no event is missed',
  },
  {
    key: 'backgroundRate',
    code: 'backgroundAssumed',
    words:
      'a background of 0 is taken: the blank needs no time, and the limits are those of few counts',
  },
];

function named(detectors: readonly DetectorSent[]): string {
  const names = detectors.map(({ name }) => name);
  return names.length > 4
    ? `${names.slice(0, 3).join(', ')} and ${names.length - 3} more`
    : names.join(', ');
}

const assumed = (code: string, path: string, message: string): Warning => ({
  code,
  level: 'caution',
  path,
  message,
});

/** A warning for everything that was not given and is taken as something. */
export function defaultWarnings({ beam, detectors, aim }: RunPlanRequest): Warning[] {
  const found: Warning[] = [];
  if (beam.dutyFactor === undefined) {
    const words =
      'A duty factor of 1 is taken: a steady beam. A pulsed one loses more to dead time.';
    found.push(assumed('dutyFactorAssumed', '/beam/dutyFactor', words));
  }
  for (const { key, code, words } of DEFAULTS) {
    const without = detectors.filter(
      (one) =>
        one[key] === undefined &&
        !(key === 'backgroundRate' && one.beamBackgroundRate !== undefined),
    );
    const [first] = without;
    if (!first) continue;
    const path = `/detectors/${detectors.indexOf(first)}/${key}`;
    found.push(assumed(code, path, `For ${named(without)} ${words}.`));
  }
  const unknown = detectors.filter(
    ({ deadTime, deadTimeModel }) => deadTime && deadTime.value > 0 && deadTimeModel === undefined,
  );
  const [first] = unknown;
  if (first) {
    const path = `/detectors/${detectors.indexOf(first)}/deadTimeModel`;
    const words = `For ${named(unknown)} a counter that is not paralysed is taken: say deadTimeModel.`;
    found.push(assumed('deadTimeModelAssumed', path, words));
  }
  if (aim?.relativePrecision === undefined) {
    const words = `A relative precision of ${100 * DEFAULT_PRECISION} % is aimed at; say aim.relativePrecision.`;
    found.push(assumed('aimAssumed', '/aim/relativePrecision', words));
  }
  return found;
}
