import type { PlannedDetector } from './planned-detector.ts';
import type { RunPlanResult } from './run-plan.ts';
import type { Warning } from './warning.ts';

const DEGREE = Math.PI / 180;

export const percent = (fraction: number) => `${Number((100 * fraction).toPrecision(2))} %`;
export const degrees = (radians: number) => `${Number((radians / DEGREE).toPrecision(3))} degrees`;
export const caution = (code: string, message: string, path?: string): Warning => ({
  code,
  level: 'caution',
  message,
  ...(path !== undefined && { path }),
});
export const info = (code: string, message: string, path?: string): Warning => ({
  code,
  level: 'info',
  message,
  ...(path !== undefined && { path }),
});
const listed = (names: readonly string[]): string =>
  names.length > 4
    ? `${names.slice(0, 3).join(', ')} and ${names.length - 3} more`
    : names.join(', ');
export const targetPath = ({ plan }: RunPlanResult) =>
  plan.target.kind === 'gas' ? '/gas' : '/foil';

/** One warning for all detectors it concerns. */
export function ofDetectors(
  { detectors }: RunPlanResult,
  concerns: (one: PlannedDetector) => boolean,
  warn: (names: string, first: PlannedDetector, path: string) => Warning,
): Warning[] {
  const found = detectors.filter(concerns);
  const [first] = found;
  if (!first) return [];
  const names = listed(found.map(({ detector }) => detector.name));
  return [warn(names, first, `/detectors/${detectors.indexOf(first)}`)];
}
