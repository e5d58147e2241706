import type { Complex, Term } from '#server/physics/potentials/types.ts';
import { localPotential } from '../local-potential.ts';
import type { Amplitude, Unavailable } from '../amplitude.ts';
import type { MethodInput } from '../method-input.ts';
import { highestWave } from './highest-wave.ts';
import { potentialEdges, radialMesh } from './radial-mesh.ts';
import { secondOrderWaves } from './second-order-waves.ts';
import { waveSum } from './wave-sum.ts';
import { yukawaParts, yukawaSecondBorn } from './yukawa-pairs.ts';

/** f2 as a function of q, and what complex depths remove in second order, angstrom². */
export interface SecondAmplitude {
  at: (q: number, blur?: number) => Amplitude;
  absorption: { value: number; error: number };
  /** Largest error at any angle, angstrom. */
  largestError: number;
}

/** Widths of the panels times k: the waves turn through twice as much, and sixteen points follow either to rounding. */
const COARSE = 5;
const FINE = 3.5;
/** Points times waves: about a second. */
const MOST_PRODUCTS = 7e7;

/** Sums of Yukawa potentials, in closed form; null for anything else. */
export function closedSecondAmplitude({
  terms,
  k,
  twoMuOverHbar2,
}: MethodInput): SecondAmplitude | null {
  const active = terms.filter(({ strength }) => strength.re !== 0 || strength.im !== 0);
  const parts = yukawaParts(active, twoMuOverHbar2);
  if (parts === null || parts.some(({ im }) => im !== 0)) return null;
  return {
    at: yukawaSecondBorn(parts, k),
    absorption: { value: 0, error: 0 },
    largestError: 0,
  };
}

/** The phase that all complex strengths share up to sign; null where all are real, or they differ. */
function commonPhase(terms: readonly Term[]): Complex | null {
  const [first, ...others] = terms
    .map(({ strength }) => strength)
    .filter(({ re, im }) => re !== 0 || im !== 0);
  if (!first) return null;
  const size = Math.hypot(first.re, first.im);
  const shared = others.every(({ re, im }) => re * first.im === im * first.re);
  const real = first.im === 0 && others.every(({ im }) => im === 0);
  return shared && !real ? { re: first.re / size, im: first.im / size } : null;
}

const turnedBack =
  (phase: Complex) =>
  (term: Term): Term => {
    const { re, im } = term.strength;
    return { ...term, strength: { re: re * phase.re + im * phase.im, im: 0 } };
  };

/**
 * Second-order amplitude by partial waves, on two meshes of different widths: their difference, wave by wave, is the error of the
 * radial integrals.
 */
export function numericalSecondAmplitude({
  terms,
  k,
  twoMuOverHbar2,
}: MethodInput): SecondAmplitude | Unavailable {
  const phase = commonPhase(terms);
  const potential = localPotential(phase ? terms.map(turnedBack(phase)) : terms, twoMuOverHbar2);
  const edges = potential.edges.length === 0 ? [] : potentialEdges(potential, k);
  if (edges === null) {
    return {
      unavailable: 'The potential varies too fast or too wildly to be followed point by point.',
    };
  }
  if (edges.length === 0) return nothing();
  const work = (16 * k * (edges.at(-1) ?? 0)) / FINE;
  if (work * k * potential.range > MOST_PRODUCTS) return tooLong();
  const [coarse, fine] = [COARSE, FINE].map((width) => radialMesh(potential, edges, width / k));
  if (!coarse || !fine) return nothing();
  const lMax = highestWave(coarse, k);
  if (!((coarse.length + fine.length) * 16 * lMax <= MOST_PRODUCTS)) return tooLong();
  const [rough, waves] = [coarse, fine].map((mesh) => secondOrderWaves(mesh, k, lMax, phase));
  if (!rough || !waves) return nothing();
  const error = waves.rounding.map(
    (rounding, l) =>
      rounding +
      Math.hypot(
        (waves.secondRe[l] ?? 0) - (rough.secondRe[l] ?? 0),
        (waves.secondIm[l] ?? 0) - (rough.secondIm[l] ?? 0),
      ),
  );
  const sum = waveSum({ re: waves.secondRe, im: waves.secondIm, error }, k);
  if (!Number.isFinite(sum.largestError)) {
    return {
      unavailable: 'The waves of second order do not die away within reach of the computation.',
    };
  }
  return { ...sum, absorption: absorptionOf(waves.absorbed, error, k) };
}

function absorptionOf(absorbed: Float64Array, error: Float64Array, k: number) {
  const factor = (l: number) => (4 * Math.PI * (2 * l + 1)) / k / k;
  if (absorbed.every((value) => value === 0)) return { value: 0, error: 0 };
  return {
    value: absorbed.reduce((sum, value, l) => sum + factor(l) * value, 0),
    error: error.reduce((sum, value, l) => sum + factor(l) * value, 0),
  };
}

function nothing(): SecondAmplitude {
  return {
    at: () => ({ re: 0, im: 0, error: 0 }),
    absorption: { value: 0, error: 0 },
    largestError: 0,
  };
}

function tooLong(): Unavailable {
  return {
    unavailable:
      'The second-order amplitude would take too long: the product of wave number and reach of the potential is too large. The eikonal serves there.',
  };
}
