import type { Reference } from '#shared/contracts/aids.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { fullDigits } from '#shared/units/format.ts';
import type { TableUnits } from '../../model/csv.ts';
import { abscissaOf } from '../../model/curves.ts';
import type { Abscissa, Curve } from '../../model/curves.ts';

export type PointCharges = Extract<Reference, { kind: string }>;

export const REFERENCE_NAMES: Record<PointCharges['kind'], string> = {
  rutherford: 'Rutherford',
  mott: 'Mott',
};

/** The ratio as a curve against the abscissa shown; angle by angle it belongs to the first curve. */
export function ratioSeries(curve: Curve, { points }: PointCharges, abscissa: Abscissa) {
  return curve.points.flatMap((point, place): [number, number | null][] => {
    const x = abscissaOf(point, abscissa);
    return x === null ? [] : [[x, points[place]?.ratio ?? null]];
  });
}

const number = (value: number | null | undefined) =>
  value === null || value === undefined ? '' : fullDigits(value);

/** The curve, the point-charge cross section and their ratio, with a row of names and one of units and frames. */
export function ratioRows(curve: Curve, reference: PointCharges, units: TableUnits): string[][] {
  const name = REFERENCE_NAMES[reference.kind];
  const frame = ` (${units.frame})`;
  const factor = composedFactor(reference.unit, units.dcs);
  return [
    ['theta', 'q', `dcs ${curve.name}`, `dcs ${name}`, `ratio to ${name}`],
    [
      `${units.angle}${frame}`,
      `${units.wavenumber} (cm)`,
      `${units.dcs}${frame}`,
      `${units.dcs}${frame}`,
      '1',
    ],
    ...curve.points.map((point, place) => {
      const bare = reference.points[place];
      const dcs = bare?.dcs ?? null;
      return [
        number(point.theta),
        number(point.q),
        number(point.dcs),
        number(dcs === null ? null : dcs * factor),
        number(bare?.ratio),
      ];
    }),
  ];
}
