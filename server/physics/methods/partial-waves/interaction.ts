import type { Unavailable } from '../amplitude.ts';
import type { MethodInput } from '../method-input.ts';
import type { RadialField } from '#server/physics/numerics/radial-trial.ts';
import type { Term } from '#server/physics/potentials/types.ts';

/** Components of the field: central part and what multiplies l·sigma. */
export const CENTRAL_RE = 0;
export const CENTRAL_IM = 1;
export const SPIN_RE = 2;
export const SPIN_IM = 3;
/** The central real part without its Coulomb tail, where there is one. */
export const SHORT = 4;

/** What the radial equation of one energy needs to know; U = (2 mu/hbar²) V in 1/angstrom². */
export interface RadialInteraction {
  /** U(r) without shells, Coulomb tail included; 1, 2, 4 or 5 components. */
  field: RadialField;
  absorbs: boolean;
  spinOrbit: boolean;
  /** Nothing enters below this radius, angstrom; 0 without a hard core. */
  core: number;
  /** Where the slope jumps by jump · u. */
  shells: { radius: number; jump: number }[];
  /** Radii where U or a derivative jumps. */
  breaks: number[];
  /** Largest range of its terms, angstrom. */
  size: number;
  /** Beyond it only the Coulomb tail is left, or a power of r where `power`, angstrom. */
  reach: number;
  /** c of the Coulomb tail c/r of U, 1/angstrom: 2 eta k. */
  charge: number;
  /** Whether a tail falls as a power faster than 1/r³. */
  power: boolean;
}

/** Powers beyond are taken for exponentials. */
const STEEPEST_POWER = 20;

/** Whether a term falls off as a power of r; a formula says so by its values alone. */
function fallsAsPower({ tail, form, reach, v }: Term): boolean {
  if (tail === 'power') return true;
  if (form !== 'expression' || tail !== 'exponential' || reach === null || v === null) return false;
  const fall = (r: number) => Math.log2(v(r) / v(2 * r));
  const [near, far] = [fall(reach / 64), fall(reach / 8)];
  return far < STEEPEST_POWER && Math.abs(far - near) < 0.02 * far;
}

const isActive = ({ strength }: Term): boolean => strength.re !== 0 || strength.im !== 0;

function refusal(terms: readonly Term[], k: number): string | null {
  for (const { form, strength, spinOrbit, kinks = [] } of terms) {
    if (form === 'contact') {
      return 'A contact interaction is first order by definition: its length already is the exact one at zero energy, and higher orders of a delta function in three dimensions do not exist. Use born1.';
    }
    const joint = Math.min(...kinks);
    if (form === 'atomicElectron' && 2 * k > joint) {
      return `atomicElectron is known by its scattering factor: a sum of Gaussians, which is a potential, up to q = ${joint.toPrecision(4)} per angstrom, and another formula beyond, which is none. This energy reaches q = ${(2 * k).toPrecision(4)}; use moliere or screenedCoulomb for partial waves, or lower the energy.`;
    }
    if (strength.im > 0 && spinOrbit !== true) {
      return 'The imaginary part of the potential is positive: it would create particles. Absorption has W0 < 0.';
    }
  }
  return null;
}

/** Furthest radius at which what is left of U beside the Coulomb tail is more than rounding of that tail. */
function reachOf(terms: readonly Term[], rest: (r: number) => number, charge: number): number {
  const known = Math.max(
    0,
    ...terms.filter((term) => !fallsAsPower(term)).map(({ reach }) => reach ?? 0),
  );
  const open = terms.filter(({ reach, norm }) => reach === null && norm > 0);
  if (open.length === 0) return known;
  const scale = Math.max(
    ...open.map(({ range, breakpoints }) => Math.max(range ?? 0, ...breakpoints)),
  );
  const size = open.reduce((sum, { strength }) => sum + Math.abs(strength.re), Math.abs(charge));
  // Tails of charges end as Gaussians or exponentials, so nothing comes back once it has gone.
  let last = scale;
  for (let r = scale; r < 400 * scale; r *= 1.05) {
    if (Math.abs(rest(r) * r) > 4e-15 * size) last = 1.05 * r;
  }
  return Math.max(known, last);
}

/**
 * The sum of all terms as the radial equation takes it.
 *
 * @param input terms, first order (for its tail) and 2 mu/hbar²
 * @returns U(r) in 1/angstrom² and what is special about it, or why partial waves cannot be had
 */
export function radialInteraction(input: MethodInput): RadialInteraction | Unavailable {
  const { twoMuOverHbar2, born } = input;
  const terms = input.terms.filter(isActive);
  const reason = refusal(terms, input.k);
  if (reason !== null) return { unavailable: reason };
  if (born.tail.im !== 0) {
    return {
      unavailable:
        'A 1/r tail with an imaginary part absorbs at any distance: no partial wave is ever free of it.',
    };
  }
  const charge = born.tail.re;
  const cores = terms.filter(({ form }) => form === 'hardSphere');
  const shells = terms.filter(({ form }) => form === 'deltaShell');
  const smooth = terms.filter(({ form }) => form !== 'hardSphere' && form !== 'deltaShell');
  const lost = smooth.find(({ v }) => v === null);
  if (lost) return { unavailable: lost.noFunction ?? `The ${lost.form} form has no V(r).` };
  const absorbs = smooth.some(({ strength }) => strength.im !== 0);
  const spinOrbit = smooth.some((term) => term.spinOrbit === true);
  const parts = smooth.map(({ strength, v, spinOrbit: spins, coulombTail, norm }) => ({
    re: twoMuOverHbar2 * strength.re,
    im: twoMuOverHbar2 * strength.im,
    v: v ?? (() => 0),
    tail: coulombTail,
    /** A bare point charge has nothing but its tail. */
    bare: norm === 0 && coulombTail !== 0,
    first: spins === true ? SPIN_RE : CENTRAL_RE,
  }));
  const charged = charge !== 0;
  const components = charged ? 5 : spinOrbit ? 4 : absorbs ? 2 : 1;
  const at = (r: number, out: Float64Array): void => {
    out.fill(0);
    for (const { re, im, v, first, tail, bare } of parts) {
      const shape = v(r);
      out[first] = (out[first] ?? 0) + re * shape;
      if (charged && first === CENTRAL_RE && !bare) {
        out[SHORT] = (out[SHORT] ?? 0) + re * (tail === 0 ? shape : shape - tail / r);
      }
      if (im !== 0) out[first + 1] = (out[first + 1] ?? 0) + im * shape;
    }
  };
  const one = new Float64Array(components);
  const core = Math.max(0, ...cores.map(({ range }) => range ?? 0));
  const rest = (r: number) => {
    at(r, one);
    return Math.abs((one[0] ?? 0) - charge / r) + Math.abs(one[1] ?? 0);
  };
  return {
    field: { components, at },
    absorbs,
    spinOrbit,
    core,
    shells: shells.map(({ strength, range }) => ({
      radius: range ?? NaN,
      jump: twoMuOverHbar2 * strength.re,
    })),
    breaks: terms.flatMap(({ breakpoints, knots }) => [...breakpoints, ...(knots ?? [])]),
    size: Math.max(0, ...terms.map(({ range }) => range ?? 0)),
    reach: Math.max(core, reachOf(terms, rest, charge)),
    charge,
    power: terms.some(fallsAsPower),
  };
}
