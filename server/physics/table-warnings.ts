import type { EstimateResult } from './estimate.ts';
import { firstBorn } from './methods/born1.ts';
import type { Warning } from './warning.ts';

const ANGLES = 37;
/** Where the amplitude is smaller than this share of its largest nothing is said of it. */
const FAINT = 1e-3;
const COARSE = 0.01;

/** What lies between the rows of a table is a guess: how much another guess would change the amplitude. */
export function tableResolution({ problem }: EstimateResult): Warning | null {
  const { terms, collision } = problem;
  const tables = terms.filter(({ interpolationDoubt }) => interpolationDoubt !== undefined);
  if (tables.length === 0 || terms.some(({ noBorn }) => noBorn !== undefined)) return null;
  const { k, twoMuOverHbar2 } = collision;
  const born = firstBorn(terms, twoMuOverHbar2);
  const points = Array.from({ length: ANGLES }, (_, i) => {
    const q = 2 * k * Math.sin(((i + 0.5) * Math.PI) / (2 * ANGLES));
    const amplitude = born.amplitude(q);
    const size = amplitude === null ? 0 : Math.hypot(amplitude.re, amplitude.im);
    const doubt = tables.reduce(
      (sum, { strength, interpolationDoubt }) =>
        sum + Math.hypot(strength.re, strength.im) * (interpolationDoubt?.(q) ?? 0),
      0,
    );
    return { size, doubt: twoMuOverHbar2 * doubt };
  });
  const largest = Math.max(...points.map(({ size }) => size));
  const relative = points
    .filter(({ size }) => size > FAINT * largest)
    .map(({ size, doubt }) => doubt / size);
  const worst = Math.max(0, ...relative);
  if (!(worst > 0)) return null;
  return {
    code: 'tableResolution',
    level: worst > COARSE ? 'caution' : 'info',
    message: `Between its rows the table is read as a cubic spline. Straight lines in its place would change the amplitude by up to ${(100 * worst).toPrecision(2)} %: a doubt about the table, no error of the computation.${worst > COARSE ? ' Give more rows where V bends.' : ''}`,
    path: '/interaction/terms',
  };
}
