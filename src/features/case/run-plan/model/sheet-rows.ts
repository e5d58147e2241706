import { fullDigits } from '#shared/units/format.ts';
import type { Sheet } from './run-sheet.ts';

/** `2:05` for two hours and five minutes from the begin. */
export function clockText(seconds: number): string {
  const minutes = Math.round(seconds / 60);
  return `${Math.floor(minutes / 60)}:${String(minutes % 60).padStart(2, '0')}`;
}

export const shiftText = ([first, last]: readonly [number, number]): string =>
  first === last ? `${first}` : `${first}–${last}`;

/** Names, units, then one row a line of the sheet, with all digits. */
export function sheetRows({ lines }: Sheet): string[][] {
  return [
    [
      'step',
      'detector',
      'angle (lab)',
      'target',
      'start',
      'counting time',
      'expected counts',
      'first shift',
      'last shift',
    ],
    ['', '', 'deg', '', 's', 's', '1', '', ''],
    ...lines.map(({ name, angle, what, start, time, counts, shifts }, index) => [
      String(index + 1),
      name,
      fullDigits(angle),
      what,
      fullDigits(start),
      fullDigits(time),
      counts === null ? '' : fullDigits(counts),
      String(shifts[0]),
      String(shifts[1]),
    ]),
  ];
}
