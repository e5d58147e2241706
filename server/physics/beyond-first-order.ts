import { DomainError } from '#shared/errors.ts';
import type {
  Amplitude,
  Condition,
  LowEnergy,
  MethodAmplitude,
  PartialWaves,
  Unavailable,
  Wave,
} from './methods/amplitude.ts';
import type { FirstBorn } from './methods/born1.ts';
import { secondBorn } from './methods/born2/second-born.ts';
import { eikonal } from './methods/eikonal/eikonal.ts';
import type { MethodInput } from './methods/method-input.ts';
import { partialWaves } from './methods/partial-waves/partial-waves.ts';
import type { ConeSamples, Scales } from './observables/cone-samples.ts';
import { sampleCone } from './observables/cone-samples.ts';
import { crossSections } from './observables/cross-sections.ts';
import type { Curve } from './observables/differential.ts';
import { curveOf } from './observables/differential.ts';
import type { CrossSections } from './observables/integrals.ts';
import { directIntegrals } from './observables/integrals.ts';
import type { MethodName, Problem } from './problem.ts';

export type BeyondName = Exclude<MethodName, 'born1'>;

/** What a method beyond first order answers; without the factors of a lepton's spin, which only first order has. */
export interface BeyondResult {
  differential: Curve;
  integrals: CrossSections;
  conditions: Condition[];
  /** |(4 pi/k) Im f(0) - elastic - absorption|/total, the integrals taken over angle; null with a Coulomb tail. */
  opticalResidual: number | null;
  waves: { list: Wave[]; lMax: number; lowEnergy: LowEnergy } | null;
  /** The amplitude itself, for whoever compares. */
  amplitude: MethodAmplitude;
}

export type Beyond = Partial<Record<BeyondName, BeyondResult | Unavailable>>;

type Way = (
  input: MethodInput & { projectileSpin: number | null },
) => MethodAmplitude | PartialWaves | Unavailable;

const WAYS: Record<BeyondName, Way> = { born2: secondBorn, eikonal, partialWaves };

/** One amplitude whose square is |f|² + |g|². */
function bothSpins(method: MethodAmplitude): (q: number) => Amplitude {
  const { flip, shortRange } = method;
  if (!flip) return (q) => shortRange(q);
  return (q) => {
    const [f, g] = [shortRange(q), flip(q)];
    return { re: Math.hypot(f.re, f.im), im: Math.hypot(g.re, g.im), error: f.error + g.error };
  };
}

function opticalResidual(method: MethodAmplitude, k: number, samples: ConeSamples): number | null {
  const { absorption } = method;
  const forward = method.amplitude(0);
  if (forward === null || 'divergent' in absorption) return null;
  const total = directIntegrals(samples)[0].value + absorption.value;
  return total > 0 ? Math.abs(((4 * Math.PI) / k) * forward.im - total) / total : 0;
}

function resultOf(
  method: MethodAmplitude | PartialWaves,
  problem: Problem,
  scales: Scales,
): BeyondResult {
  const { angles, frame, exchangeSpin, collision } = problem;
  const { k } = collision;
  const hasTail = method.tail.re !== 0 || method.tail.im !== 0;
  const samples = hasTail ? null : sampleCone(bothSpins(method), k, scales);
  const curve = { born: method, k, exchangeSpin, flip: method.flip };
  return {
    differential: curveOf(curve, angles, frame, collision.frame),
    integrals: crossSections({
      born: method,
      k,
      scales,
      samples,
      exchangeSpin,
      absorption: method.absorption,
    }),
    conditions: method.conditions,
    opticalResidual: samples && opticalResidual(method, k, samples),
    waves:
      'waves' in method
        ? { list: method.waves, lMax: method.lMax, lowEnergy: method.lowEnergy }
        : null,
    amplitude: method,
  };
}

/** What cannot be computed within reason is unavailable beside the other methods, no error of the whole. */
function within(work: () => BeyondResult | Unavailable): BeyondResult | Unavailable {
  try {
    return work();
  } catch (fault) {
    if (fault instanceof DomainError && fault.code === 'tooMuchWork') {
      return { unavailable: fault.message };
    }
    throw fault;
  }
}

function one(
  name: BeyondName,
  problem: Problem,
  born: FirstBorn,
  scales: Scales,
): BeyondResult | Unavailable {
  const { terms, collision, exchangeSpin, projectile } = problem;
  const { k, twoMuOverHbar2 } = collision;
  const input = { terms, born, k, twoMuOverHbar2, projectileSpin: projectile.spin };
  const method = WAYS[name](input);
  if ('unavailable' in method) return method;
  if (method.flip && exchangeSpin !== null) {
    return {
      unavailable:
        'A spin-orbit term between identical particles needs amplitudes of total spin, which are not part of this version.',
    };
  }
  return resultOf(method, problem, scales);
}

/**
 * Every method beyond first order that was asked for.
 *
 * @param born first order of those terms that have one
 * @returns curve, integrals, conditions and waves of each, or why there is none
 */
export function beyondFirstOrder(problem: Problem, born: FirstBorn, scales: Scales): Beyond {
  const found: Beyond = {};
  for (const name of problem.methods) {
    if (name !== 'born1') found[name] = within(() => one(name, problem, born, scales));
  }
  return found;
}
