import { formatNumber } from '#shared/units/format.ts';

const MINUTE = 60;
const HOUR = 3600;
const DAY = 86_400;

/** A time as people plan it: seconds, minutes, hours, then days. */
export function timeText(seconds: number): string {
  if (seconds < 2 * MINUTE) return `${formatNumber(seconds, 3)} s`;
  if (seconds < 2 * HOUR) return `${formatNumber(seconds / MINUTE, 3)} min`;
  if (seconds < 3 * DAY) return `${formatNumber(seconds / HOUR, 3)} h`;
  return `${formatNumber(seconds / DAY, 3)} d`;
}

export const percentText = (fraction: number, digits = 3): string =>
  `${formatNumber(100 * fraction, digits)} %`;

export function rateText(perSecond: number): string {
  return `${formatNumber(perSecond, 4)} /s`;
}
