import type { FormPicture } from '#shared/contracts/reference.ts';

const POINTS = 48;
/** A potential that rises without end at the origin is cut where its outer part still shows. */
const OUTER = 0.12;
const HEADROOM = 2;

/** V(r) small: r from 0 to 1, V between -1 and 1; null where V is no function. */
export function sketchOf({ potential }: FormPicture): [number, number][] | null {
  if ('unavailable' in potential) return null;
  const end = potential.r.at(-1) ?? 1;
  const sizes = potential.re.map(Math.abs);
  const outer = Math.max(...sizes.filter((_, i) => (potential.r[i] ?? 0) >= OUTER * end));
  const whole = Math.max(...sizes);
  const top = whole > 2 * HEADROOM * outer ? HEADROOM * outer : whole;
  if (!(top > 0)) return null;
  const all = potential.r.flatMap((r, i): [number, number][] => {
    const height = (potential.re[i] ?? 0) / top;
    return Math.abs(height) > 1 ? [] : [[Number((r / end).toFixed(4)), Number(height.toFixed(4))]];
  });
  const step = Math.max(1, all.length / POINTS);
  const kept = Array.from(
    { length: Math.min(POINTS, all.length) },
    (_, i) => all[Math.floor(i * step)],
  );
  return [...kept, all.at(-1)].filter((point): point is [number, number] => point !== undefined);
}
