import type { Amplitude, ScatteringAmplitude } from '#server/physics/methods/amplitude.ts';
import { exchangeWeight } from '#server/physics/methods/exchange.ts';
import type { AngularFactor } from '#server/physics/methods/lepton-spin.ts';
import { UNIT_ROUNDOFF } from '#server/physics/numerics/rounding.ts';
import { DomainError } from '#shared/errors.ts';
import type { ConeSamples, Scales } from './cone-samples.ts';
import { sampleCone } from './cone-samples.ts';
import type { Computed, CrossSections, Integral } from './integrals.ts';
import { DIVERGENCES, absorption, directIntegrals, exchangeIntegrals, sumOf } from './integrals.ts';

export interface CrossSectionInput {
  born: ScatteringAmplitude;
  k: number;
  scales: Scales;
  /** Null where the interaction has a Coulomb tail: there is nothing to integrate then. */
  samples: ConeSamples | null;
  /** Spin of identical particles; null for distinct ones. */
  exchangeSpin: number | null;
  /** What stands after the square of the amplitude: the spin of a lepton; null without one. */
  factor?: AngularFactor | null;
  /** Incoherent scattering, angstrom²/sr. */
  incoherent?: number;
  /** What complex depths remove, where the method knows it by itself; first order's (4 pi/k) Im f(0) otherwise. */
  absorption?: Integral;
}

const plus = (a: Computed, b: Computed): Computed => ({
  value: Math.max(0, a.value + b.value),
  error: a.error + b.error,
});

/** An integral that is neither good to 1e-6 nor lost in the floor is refused: no silent wrong number. */
function refuseCoarse({ value, error }: Computed, floor: number): void {
  if (error <= Math.max(1e-6 * value, 4 * Math.PI * floor ** 2)) return;
  throw new DomainError(
    'tooMuchWork',
    'The cross section cannot be integrated to a millionth of itself: the product of wave number and range is too large. Lower the energy or the range, or check their units.',
  );
}

/**
 * Elastic, absorption, total, momentum-transfer and viscosity cross section, angstrom², or why there is none.
 *
 * Integrals and their weights use the centre-of-mass angle. For identical particles dσ/dΩ counts both, so half of the
 * sphere's integral is taken for every one of them; the momentum-transfer weight then averages to one.
 *
 * @throws DomainError('tooMuchWork') where an integral is neither good to 1e-6 nor below the floor
 */
export function crossSections(input: CrossSectionInput): CrossSections {
  const { born, k, samples } = input;
  const removed = input.absorption ?? absorption(born, k);
  if (samples === null) {
    return {
      elastic: { divergent: DIVERGENCES.elastic },
      absorption: removed,
      total: { divergent: DIVERGENCES.total },
      momentumTransfer: { divergent: DIVERGENCES.momentumTransfer },
      viscosity: { divergent: DIVERGENCES.viscosity },
    };
  }
  const coherent = angular(input, withSpin(input, samples));
  const [elastic, momentumTransfer, viscosity] = withIncoherent(coherent, input.incoherent ?? 0);
  for (const integral of [elastic, momentumTransfer, viscosity]) refuseCoarse(integral, born.floor);
  const total = sumOf(elastic, removed);
  return { elastic, absorption: removed, total, momentumTransfer, viscosity };
}

/** The amplitude sampled again with the square root of the factor: its moments are those of the whole. */
function withSpin({ born, k, scales, factor }: CrossSectionInput, plain: ConeSamples): ConeSamples {
  if (!factor) return plain;
  const whole = (q: number): Amplitude => {
    const { re, im, error } = born.shortRange(q);
    const spin = factor(2 * Math.asin(Math.min(1, q / (2 * k))));
    const root = Math.sqrt(spin.value);
    const blur = root > 0 ? spin.error / (2 * root) : 0;
    return { re: re * root, im: im * root, error: error * root + Math.hypot(re, im) * blur };
  };
  return sampleCone(whole, k, scales);
}

/** Isotropic scattering adds 4 pi, 4 pi and 8 pi/3 times itself to the three integrals. */
function withIncoherent(
  coherent: [Computed, Computed, Computed],
  incoherent: number,
): [Computed, Computed, Computed] {
  const [elastic, momentumTransfer, viscosity] = coherent;
  const add = (to: Computed, share: number): Computed => {
    const more = share * incoherent;
    return { value: to.value + more, error: to.error + 4 * UNIT_ROUNDOFF * more };
  };
  const sphere = 4 * Math.PI;
  return [add(elastic, sphere), add(momentumTransfer, sphere), add(viscosity, (2 / 3) * sphere)];
}

function angular(
  { born, k, scales, exchangeSpin }: CrossSectionInput,
  samples: ConeSamples,
): [Computed, Computed, Computed] {
  const [elastic, momentumTransfer, viscosity] = directIntegrals(samples);
  if (exchangeSpin === null) return [elastic, momentumTransfer, viscosity];
  const weight = exchangeWeight(exchangeSpin);
  const f = (q: number) => born.shortRange(q, 0);
  const [more, moreViscosity] = exchangeIntegrals(f, k, scales, weight);
  const collisions = plus(elastic, more);
  return [collisions, collisions, plus(viscosity, moreViscosity)];
}
