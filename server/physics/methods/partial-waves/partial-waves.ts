import type { Term } from '#server/physics/potentials/types.ts';
import type { Amplitude, Condition, PartialWaves, Unavailable, Wave } from '../amplitude.ts';
import type { FirstBorn } from '../born1.ts';
import { firstBorn } from '../born1.ts';
import { coulombAmplitude } from '../coulomb-amplitude.ts';
import type { MethodInput } from '../method-input.ts';
import {
  directCoefficients,
  directSum,
  flipAmplitude,
  flipCoefficients,
  isCharged,
} from './assemble.ts';
import type { Coefficients } from './assemble.ts';
import type { RadialInteraction } from './interaction.ts';
import { radialInteraction } from './interaction.ts';
import { lowEnergy } from './low-energy.ts';
import type { Scattered } from './scatter.ts';
import { scatter } from './scatter.ts';
import type { Transition } from './transition.ts';
import { weightOf } from './transition.ts';
import { scatterCharged } from './scatter-charged.ts';
import { scatterPowerTail } from './scatter-power-tail.ts';

export interface PartialWaveInput extends MethodInput {
  /** Spin of the projectile; null where it is not known. */
  projectileSpin: number | null;
}

/** Below this share of Σ (2l+1)|T_l|/k an amplitude is lost; where its error is larger, below that, to the second share. */
const FLOOR = 1e-11;
const HIGHEST_FLOOR = 1e-8;
const NO_AMPLITUDE: Amplitude = { re: 0, im: 0, error: 0 };
/** |S| may exceed one by its error, or a wave creates particles. */
const CREATES = 1e-9;

function waveOf({ l, spin, re, im, eta, error }: Transition, { born }: Scattered): Wave {
  return {
    l,
    j: spin === 0 ? null : l + spin / 2,
    delta: Math.atan2(2 * re, 1 - 2 * im) / 2,
    eta: Math.min(eta, 1 + 2 * error),
    error,
    born: born?.re[l] ?? null,
  };
}

function absorptionOf({ waves, born, summed }: Scattered, k: number, forward: Amplitude) {
  let sum = 0;
  let square = 0;
  for (const wave of waves) {
    if (wave.l > summed) continue;
    const weight = weightOf(wave);
    sum += weight * (wave.absorbed - 4 * (born?.im[wave.l] ?? 0));
    square += (4 * weight * wave.error) ** 2;
  }
  const scale = Math.PI / (k * k);
  return {
    value: scale * (sum + 4 * k * forward.im),
    error: scale * (4 * Math.sqrt(square) + 4 * k * forward.error),
  };
}

function conditionsOf(scattered: Scattered, k: number, size: number): Condition[] {
  const reported = (name: string, value: number, meaning: string): Condition => ({
    name,
    value,
    holds: true,
    meaning,
  });
  return [
    reported('kR', k * size, 'Wave number times the range: about how many waves scatter.'),
    reported(
      'lMax',
      scattered.lMax,
      scattered.born
        ? 'Highest wave whose radial equation was solved; beyond it phases of first order stand.'
        : 'Highest wave whose radial equation was solved; higher ones are not scattered.',
    ),
    reported('waves', scattered.waves.length, 'Waves with a phase shift of their own.'),
  ];
}

/** First order of the terms that have one: the rest dies out with l by itself. */
function closureOf(terms: readonly Term[], twoMuOverHbar2: number): FirstBorn {
  return firstBorn(
    terms.filter(({ noBorn }) => noBorn === undefined),
    twoMuOverHbar2,
  );
}

function floorOf({ size, error }: Coefficients, born: FirstBorn): number {
  return Math.max(FLOOR * size, Math.min(2 * error, HIGHEST_FLOOR * size), born.floor);
}

function spinRefusal({ spinOrbit }: RadialInteraction, spin: number | null): Unavailable | null {
  if (!spinOrbit || spin === 0.5) return null;
  return {
    unavailable:
      spin === null
        ? 'The spin of the projectile is not known; a spin-orbit term needs one of spin 1/2. Give the spin of the projectile.'
        : `The projectile has spin ${spin}; a spin-orbit term is made for spin 1/2 alone.`,
  };
}

function creation({ waves }: Scattered): Unavailable | null {
  const worst = waves.find(({ eta, error }) => eta > 1 + CREATES + 4 * error);
  if (!worst) return null;
  return {
    unavailable: `The imaginary part of the spin-orbit term makes |S| = ${worst.eta.toPrecision(6)} in the wave l = ${worst.l}: it would create particles there. Lower Wso, or deepen W0.`,
  };
}

/**
 * Exact scattering by a central potential, and by one with a spin-orbit term, wave by wave.
 *
 * Formula: u'' = [l(l+1)/r² + U - k²] u, matched to free or Coulomb waves; f = f1 + (1/k) Σ (2l+1)(T_l - T_l^Born) P_l with
 *   T_l = (S_l - 1)/2i, so that first order closes the sum; with a Coulomb tail f = f_C + (1/k) Σ (2l+1) e^{2i sigma_l} T_l P_l.
 *
 * @param input terms, first order, k in 1/angstrom, 2 mu/hbar² and the spin of the projectile
 * @returns amplitude, waves, absorption and low-energy parameters; or why partial waves cannot be had
 *
 * Validity: the radial Schrödinger equation with this k and mu: no V² term of relativity, no spin but that of a spinOrbit term.
 *
 * Source: H. Faxén and J. Holtsmark, Z. Phys. 45 (1927) 307; N. F. Mott and H. S. W. Massey, The Theory of Atomic Collisions, 3rd ed.
 * (1965), chs. II, III and IX.
 */
export function partialWaves(input: PartialWaveInput): PartialWaves | Unavailable {
  const { k, twoMuOverHbar2 } = input;
  const born = closureOf(input.terms, twoMuOverHbar2);
  const interaction = radialInteraction({ ...input, born });
  if ('unavailable' in interaction) return interaction;
  const refused = spinRefusal(interaction, input.projectileSpin);
  if (refused) return refused;
  const charged = interaction.charge !== 0;
  const scattered = charged
    ? scatterCharged(interaction, k)
    : interaction.power
      ? scatterPowerTail(interaction, k, born)
      : scatter(interaction, k);
  if ('unavailable' in scattered) return scattered;
  const created = creation(scattered);
  if (created) return created;
  const closing = (q: number, blur: number) =>
    scattered.born ? born.shortRange(q, blur) : NO_AMPLITUDE;
  const direct = directCoefficients(scattered, k);
  const shortRange = (q: number, blur = 0): Amplitude => {
    const sum = directSum(direct, k, q, blur);
    const first = closing(q, blur);
    return { re: first.re + sum.re, im: first.im + sum.im, error: first.error + sum.error };
  };
  const pointCharges = isCharged(scattered) ? coulombAmplitude(scattered.eta, k) : null;
  const amplitude = (q: number, blur = 0): Amplitude | null => {
    const rest = shortRange(q, blur);
    if (!pointCharges) return rest;
    const point = pointCharges(q, blur);
    return (
      point && { re: point.re + rest.re, im: point.im + rest.im, error: point.error + rest.error }
    );
  };
  const turned = interaction.spinOrbit ? flipCoefficients(scattered, k) : null;
  return {
    amplitude,
    shortRange,
    tail: { re: interaction.charge, im: 0 },
    floor: floorOf(direct, born),
    flip: turned && ((q) => flipAmplitude(turned, k, q)),
    absorption: interaction.absorbs
      ? absorptionOf(scattered, k, closing(0, 0))
      : { value: 0, error: 0 },
    conditions: conditionsOf(scattered, k, interaction.size),
    waves: scattered.waves.map((wave) => waveOf(wave, scattered)),
    lMax: scattered.lMax,
    lowEnergy: lowEnergy(interaction),
  };
}
