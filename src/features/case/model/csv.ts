import { fullDigits } from '#shared/units/format.ts';
import { csvOf } from '#src/lib/csv.ts';
import type { Curve } from './curves.ts';

export interface TableUnits {
  angle: string;
  /** Of q: 1/angstrom. */
  wavenumber: string;
  /** Of dσ/dΩ: angstrom2/sr. */
  dcs: string;
  frame: 'cm' | 'lab';
}

const number = (value: number | null | undefined) =>
  value === null || value === undefined ? '' : fullDigits(value);

/** The numbers of the table with all digits: one row of names, one of units and frames, then one row an angle. Divergent and unreachable points are empty. */
export function curvesRows(curves: readonly Curve[], units: TableUnits): string[][] {
  const names = ['theta', 'q', 'cos theta', ...curves.flatMap(({ name }) => [`dcs ${name}`])];
  const unitRow = [
    `${units.angle} (${units.frame})`,
    `${units.wavenumber} (cm)`,
    '1',
    ...curves.map(() => `${units.dcs} (${units.frame})`),
  ];
  const count = Math.max(0, ...curves.map(({ points }) => points.length));
  const rows = Array.from({ length: count }, (_, index) => {
    const first = curves[0]?.points[index];
    return [
      number(first?.theta),
      number(first?.q),
      number(first?.cos),
      ...curves.map(({ points }) => number(points[index]?.dcs)),
    ];
  });
  return [names, unitRow, ...rows];
}

export function curvesCsv(curves: readonly Curve[], units: TableUnits): string {
  return csvOf(curvesRows(curves, units));
}

/** For the clipboard: a spreadsheet takes columns parted by tabs as they are. */
export function curvesTabbed(curves: readonly Curve[], units: TableUnits): string {
  return curvesRows(curves, units)
    .map((row) => row.join('\t'))
    .join('\n');
}
