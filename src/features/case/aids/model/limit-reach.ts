import type { Estimate } from '#shared/contracts/estimates.ts';
import { composedFactor } from '#shared/units/composed.ts';

/** A tail that falls less steeply than this power of r where the drawing ends has no range to speak of. */
const STEEP = 5;

/**
 * Radius beyond which V is too small to be drawn, angstrom; null where V fades like a power of r, for the forward
 * direction then knows no scale, or is not drawn.
 */
export function reachOf({ potential }: Estimate): number | null {
  if ('unavailable' in potential) return null;
  const { r, v, unit } = potential;
  const sizes = v.map((value) =>
    typeof value === 'number' ? Math.abs(value) : Math.hypot(value.re, value.im),
  );
  const [end = 0, last = 0] = [r.at(-1), sizes.at(-1)];
  const before = r.findLastIndex((radius) => radius < 0.95 * end);
  const [inner = 0, earlier = 0] = [r[before], sizes[before]];
  const steep = last === 0 || Math.log(earlier / last) > STEEP * Math.log(end / inner);
  return steep && end > 0 ? end * composedFactor(unit.r, 'angstrom') : null;
}
