import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import type { Amplitude, Condition, PartialWaves, Unavailable, Wave } from '../amplitude.ts';
import type { Term } from '#server/physics/potentials/types.ts';
import type { FirstBorn } from '../born1.ts';
import { firstBorn } from '../born1.ts';
import type { MethodInput } from '../method-input.ts';
import { radialInteraction } from './interaction.ts';
import { lowEnergy } from './low-energy.ts';
import type { Scattered, Transition } from './scatter.ts';
import { scatter, weightOf } from './scatter.ts';
import { waveSum } from './wave-sum.ts';

export interface PartialWaveInput extends MethodInput {
  /** Spin of the projectile; null where it is not known. */
  projectileSpin: number | null;
}

const Q_ALLOWANCE = 8 * UNIT_ROUNDOFF;
const FLOOR = 1e-11;

function waveOf({ l, spin, re, im, eta, error }: Transition, { born }: Scattered): Wave {
  return {
    l,
    j: spin === 0 ? null : l + spin / 2,
    delta: Math.atan2(2 * re, 1 - 2 * im) / 2,
    eta,
    error,
    born: born?.re[l] ?? null,
  };
}

/** (2l+1)(T_l - first order)/k by l, and the sum of what is not known of them. */
function coefficients({ waves, born, lMax, left }: Scattered, k: number) {
  const re = new Float64Array(lMax + 1);
  const im = new Float64Array(lMax + 1);
  let square = 0;
  let size = 0;
  for (const wave of waves) {
    const weight = weightOf(wave) / k;
    const { l } = wave;
    if (l > lMax) continue;
    re[l] = (re[l] ?? 0) + weight * (wave.re - (born?.re[l] ?? 0));
    im[l] = (im[l] ?? 0) + weight * (wave.im - (born?.im[l] ?? 0));
    const own = weight * (wave.error + 16 * UNIT_ROUNDOFF * Math.abs(born?.re[l] ?? 0));
    square += own * own;
    size += weight * Math.hypot(wave.re, wave.im);
  }
  // Roundings of different waves do not know of each other.
  return { re, im, error: left / k + 4 * Math.sqrt(square), size };
}

function absorptionOf({ waves, born, lMax }: Scattered, k: number, forward: Amplitude) {
  let sum = 0;
  let error = 0;
  for (const wave of waves) {
    if (wave.l > lMax) continue;
    const weight = weightOf(wave);
    sum += weight * (wave.absorbed - 4 * (born?.im[wave.l] ?? 0));
    error += 4 * weight * wave.error;
  }
  const scale = Math.PI / (k * k);
  return {
    value: scale * (sum + 4 * k * forward.im),
    error: scale * (error + 4 * k * forward.error),
  };
}

function conditionsOf(scattered: Scattered, k: number, size: number): Condition[] {
  return [
    {
      name: 'kR',
      value: k * size,
      holds: true,
      meaning: 'Wave number times the range: about how many waves scatter.',
    },
    {
      name: 'lMax',
      value: scattered.lMax,
      holds: true,
      meaning: 'Highest wave whose radial equation was solved; beyond it first order stands.',
    },
    {
      name: 'waves',
      value: scattered.waves.length,
      holds: true,
      meaning: 'Radial equations solved.',
    },
  ];
}

/** First order of the terms that have one and are central: the rest dies out with l by itself. */
function closureOf(terms: readonly Term[], twoMuOverHbar2: number): FirstBorn {
  return firstBorn(
    terms.filter(({ noBorn }) => noBorn === undefined),
    twoMuOverHbar2,
  );
}

/**
 * Exact scattering by a central potential, wave by wave.
 *
 * Formula: u'' = [l(l+1)/r² + U - k²] u, matched to free waves beyond the potential; f = f1 + (1/k) Σ (2l+1)(T_l - T_l^Born) P_l with
 *   T_l = (S_l - 1)/2i, so that first order closes the sum; without first order the sum itself.
 *
 * @param input terms, first order, k in 1/angstrom and 2 mu/hbar²
 * @returns amplitude, waves, absorption and low-energy parameters; or why partial waves cannot be had
 *
 * Validity: the radial Schrödinger equation with this k and mu: no V² term of relativity, no spin but that of a spinOrbit term.
 *
 * Source: H. Faxén and J. Holtsmark, Z. Phys. 45 (1927) 307; closure: textbook.
 */
export function partialWaves(input: PartialWaveInput): PartialWaves | Unavailable {
  const { k, twoMuOverHbar2 } = input;
  const born = closureOf(input.terms, twoMuOverHbar2);
  const interaction = radialInteraction({ ...input, born });
  if ('unavailable' in interaction) return interaction;
  const scattered = scatter(interaction, k);
  if ('unavailable' in scattered) return scattered;
  const { re, im, error, size } = coefficients(scattered, k);
  const amplitude = (q: number, blur = 0): Amplitude => {
    const sum = waveSum(re, im, k, q);
    const first = born.shortRange(q, blur);
    const rounding = UNIT_ROUNDOFF * (4 + Math.sqrt(re.length)) * sum.size;
    const slope = (Q_ALLOWANCE + blur) * Math.hypot(sum.slopeRe, sum.slopeIm);
    return {
      re: first.re + sum.re,
      im: first.im + sum.im,
      error: error + rounding + slope + first.error,
    };
  };
  return {
    amplitude,
    shortRange: amplitude,
    tail: { re: 0, im: 0 },
    floor: Math.max(FLOOR * size, born.floor),
    flip: null,
    absorption: interaction.absorbs
      ? absorptionOf(scattered, k, born.shortRange(0))
      : { value: 0, error: 0 },
    conditions: conditionsOf(scattered, k, interaction.size),
    waves: scattered.waves.map((wave) => waveOf(wave, scattered)),
    lMax: scattered.lMax,
    lowEnergy: lowEnergy(interaction),
  };
}
