import type { Complex, Term } from '#server/physics/potentials/types.ts';

export type PotentialCurve =
  { r: number[]; v: Complex[]; note: string | null } | { unavailable: string };

const INNER = 50;
const OUTER = 150;
/** The curve ends where r·V is below this fraction of its largest value. */
const FADED = 2e-3;
const BESIDE = 1e-6;

const isActive = ({ strength }: Term) => strength.re !== 0 || strength.im !== 0;

const OF_SPIN = 'A spin-orbit term acts on l·σ: V(r) alone is not drawn for it.';
const isCentral = ({ v, spinOrbit }: Term) => v !== null && spinOrbit !== true;

function potentialAt(terms: readonly Term[], r: number): Complex {
  let re = 0;
  let im = 0;
  for (const { strength, v } of terms) {
    const shape = v?.(r) ?? 0;
    re += strength.re * shape;
    im += strength.im * shape;
  }
  return { re, im };
}

/** Radius beyond which nothing is to be seen. */
function outerRadius(terms: readonly Term[], largest: number): number {
  const reach = Math.max(...terms.map((term) => term.reach ?? 0));
  const bound = reach > 0 ? Math.min(1.5 * reach, 50 * largest) : 50 * largest;
  const points = Array.from({ length: 400 }, (_, i) => (bound * (i + 1)) / 400);
  const sizes = points.map((r) => {
    const { re, im } = potentialAt(terms, r);
    return r * Math.hypot(re, im);
  });
  const most = Math.max(...sizes);
  const last = sizes.findLastIndex((size) => size > FADED * most);
  return Math.min(bound, 1.1 * (points[last] ?? bound));
}

/**
 * Points of V(r) for a sketch: steps of a hundredth of the shortest range near the origin, then even ones to where r·V fades;
 * both sides of every jump.
 *
 * @param terms interaction
 * @param wavelength angstrom, sets the scale of a potential without a range
 * @returns about 200 points, angstrom and eV, or why V is no function
 */
export function potentialCurve(terms: readonly Term[], wavelength: number): PotentialCurve {
  const drawn = terms.filter(isCentral);
  const missing = terms.filter((term) => !isCentral(term));
  if (drawn.length === 0) {
    const reasons = new Set(
      missing.map(({ spinOrbit, noFunction }) =>
        spinOrbit ? OF_SPIN : (noFunction ?? 'V(r) is no function.'),
      ),
    );
    return { unavailable: [...reasons].join(' ') };
  }
  const active = drawn.some(isActive) ? drawn.filter(isActive) : drawn;
  const ranges = active.flatMap((term) => (term.range === null ? [] : [term.range]));
  const scale = ranges.length > 0 ? Math.min(...ranges) : wavelength;
  const largest = ranges.length > 0 ? Math.max(...ranges) : wavelength;
  const outer = ranges.length > 0 ? outerRadius(active, largest) : 4 * wavelength;
  const inner = Math.min(0.5 * scale, outer / 4);
  const radii = [
    ...Array.from({ length: INNER }, (_, i) => (inner * (i + 1)) / INNER),
    ...Array.from({ length: OUTER }, (_, i) => inner + ((outer - inner) * (i + 1)) / OUTER),
    ...active.flatMap(({ breakpoints }) =>
      breakpoints.flatMap((edge) => [edge * (1 - BESIDE), edge * (1 + BESIDE)]),
    ),
  ];
  const r = [...new Set(radii.filter((x) => x > 0 && x <= outer))].sort((a, b) => a - b);
  const points = r.map((x) => ({ r: x, v: potentialAt(active, x) }));
  const finite = points.filter(({ v }) => Number.isFinite(v.re) && Number.isFinite(v.im));
  return {
    r: finite.map((point) => point.r),
    v: finite.map((point) => point.v),
    note: noteOn(missing, finite.length < points.length),
  };
}

function noteOn(missing: readonly Term[], infinite: boolean): string | null {
  const told = missing.map(({ form, spinOrbit }) =>
    spinOrbit ? `${form}, which acts on l·σ` : `${form}, where V(r) is no function`,
  );
  if (told.length > 0) return `Not drawn: ${told.join('; ')}.`;
  return infinite ? 'Not drawn where V(r) is infinite.' : null;
}
