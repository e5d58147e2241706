import type { PlotSeries } from '#src/components/plot-types.ts';
import { fullDigits } from '#shared/units/format.ts';
import type { DifferentialPoint, Estimate } from '#shared/contracts/estimates.ts';
import { METHOD_STYLES } from '../../model/curves.ts';
import { METHOD_NAMES } from '../../model/words.ts';
import { computedMethods } from './methods.ts';
import type { Complex } from './waves.ts';

export interface AmplitudePoint {
  /** As answered, in the frame of the angles. */
  theta: number;
  /** Where two branches lead to one angle of the lab. */
  thetaCm?: number;
  f: Complex | null;
}

export interface AmplitudeCurve {
  key: string;
  name: string;
  style: number;
  points: AmplitudePoint[];
}

/** Along the angle of the centre of mass: with two branches up the first and back down the second. */
function alongAngle(points: readonly DifferentialPoint[]): AmplitudePoint[] {
  if (!points.some(({ branches }) => (branches?.length ?? 0) > 0)) {
    return points.map(({ theta, amplitude }) => ({ theta, f: amplitude ?? null }));
  }
  return points
    .flatMap(({ theta, branches = [] }) =>
      branches.map(({ thetaCm, amplitude }) => ({ theta, thetaCm, f: amplitude })),
    )
    .sort((a, b) => a.thetaCm - b.thetaCm);
}

/** f of every method along the angle, in the unit of length of the answer; those without any amplitude are left out. */
export function amplitudeCurves(estimate: Estimate): AmplitudeCurve[] {
  return computedMethods(estimate).flatMap(({ method, result }) => {
    const points = alongAngle(result.differential);
    if (!points.some(({ f }) => f !== null)) return [];
    return [{ key: method, name: METHOD_NAMES[method], style: METHOD_STYLES[method], points }];
  });
}

export function planeSeries(curves: readonly AmplitudeCurve[]): PlotSeries[] {
  return curves.map(({ key, name, style, points }) => ({
    key,
    name,
    style,
    points: points.map(({ f }) => (f === null ? [0, null] : [f.re, f.im])),
  }));
}

export const sizeOf = ({ re, im }: Complex) => Math.hypot(re, im);
export const phaseOf = ({ re, im }: Complex) => Math.atan2(im, re);

/** Every amplitude with all digits: names, units, rows. */
export function amplitudeRows(
  curves: readonly AmplitudeCurve[],
  units: Pick<Estimate['units'], 'angle' | 'length'> & { frame: string },
): string[][] {
  const [first] = curves;
  const branched = first?.points.some(({ thetaCm }) => thetaCm !== undefined) ?? false;
  return [
    [
      'theta',
      ...(branched ? ['theta cm'] : []),
      ...curves.flatMap(({ name }) => [`Re f ${name}`, `Im f ${name}`]),
    ],
    [
      `${units.angle} (${units.frame})`,
      ...(branched ? [units.angle] : []),
      ...curves.flatMap(() => [units.length, units.length]),
    ],
    ...(first?.points ?? []).map(({ theta, thetaCm }, place) => [
      fullDigits(theta),
      ...(branched ? [thetaCm === undefined ? '' : fullDigits(thetaCm)] : []),
      ...curves.flatMap(({ points }) => {
        const f = points[place]?.f ?? null;
        return f === null ? ['', ''] : [fullDigits(f.re), fullDigits(f.im)];
      }),
    ]),
  ];
}
