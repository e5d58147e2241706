import type { PlotAxis } from '#src/components/plot-types.ts';
import type { Estimate } from '#shared/contracts/estimates.ts';
import { formatNumber, unitSymbol } from '#shared/units/format.ts';
import type { Abscissa, Curve } from './curves.ts';
import { FRAME_NAMES } from './words.ts';

/** An angle to six digits at most, none that nobody asked for. */
export function angleText(value: number, unit: string): string {
  const text = formatNumber(Number(value.toPrecision(6)), 6)
    .replace(/(\.\d*?)0+$/, '$1')
    .replace(/\.$/, '');
  return unit === 'deg' ? `${text}°` : `${text} ${unit}`;
}

/** Ticks at 30° over a wide range, as the trade is used to. */
function angleInterval(curves: readonly Curve[], unit: string): { interval?: number } {
  const angles = curves[0]?.points.map(({ theta }) => theta) ?? [];
  const span = Math.max(...angles) - Math.min(...angles);
  return unit === 'deg' && span > 90 ? { interval: 30 } : {};
}

/** The axis curves are drawn over: the angle of the frame, the momentum transfer, or the cosine. */
export function abscissaAxis(
  abscissa: Abscissa,
  curves: readonly Curve[],
  estimate: Estimate,
): PlotAxis {
  const { angle, length } = estimate.units;
  const frame = FRAME_NAMES[estimate.frame];
  if (abscissa === 'theta') {
    return {
      title: `scattering angle θ, ${frame}${angle === 'deg' ? '' : ` (${angle})`}`,
      ...(angle === 'deg' ? { tick: (value: number) => angleText(value, 'deg') } : {}),
      ...angleInterval(curves, angle),
    };
  }
  if (abscissa === 'cos') return { title: `cos θ, ${frame}` };
  return { title: `momentum transfer q, centre of mass (${unitSymbol(`1/${length}`)})` };
}

export const ABSCISSA_WORDS: Record<Abscissa, string> = {
  theta: 'angle',
  q: 'momentum transfer',
  cos: 'cosine of the angle',
};
