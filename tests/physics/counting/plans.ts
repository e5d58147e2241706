import { computeRunPlan } from '#server/modules/run-plans/compute-run-plan.ts';
import { runPlanRequestSchema } from '#shared/contracts/run-plans.ts';
import type { RunPlan } from '#shared/contracts/run-plans.ts';
import { DomainError } from '#shared/errors.ts';

export const Q = (value: number, unit: string) => ({ value, unit });

/** The whole way of a run plan, as a thread walks it. */
export function plan(body: object): RunPlan {
  return computeRunPlan(runPlanRequestSchema.parse(body));
}

/** Pointers and words of a refusal; fails where nothing is refused. */
export function faultsOf(body: object): { path: string; message: string }[] {
  try {
    plan(body);
  } catch (error) {
    if (error instanceof DomainError && error.code === 'invalidInput') {
      return error.details.errors ?? [];
    }
    throw error;
  }
  throw new Error('Nothing was refused.');
}

/** The one detector of a plan that has one. */
export function only({ detectors }: RunPlan) {
  const [one, ...others] = detectors;
  if (!one || others.length > 0) throw new Error('one detector was expected');
  return one;
}

export function valueOf(quantity: object | null): number {
  if (quantity === null || !('value' in quantity) || typeof quantity.value !== 'number') {
    throw new Error(`no value: ${JSON.stringify(quantity)}`);
  }
  return quantity.value;
}

/** Everywhere 1 b/sr: a scattering length of 10 fm on a fixed centre. */
export const ONE_BARN = {
  projectile: { species: 'proton' },
  target: { kind: 'fixed', charge: 79 },
  energy: Q(1, 'MeV'),
  interaction: { terms: [{ form: 'contact', b: Q(10, 'fm') }] },
  methods: ['born1'],
  units: { area: 'barn', length: 'fm', energy: 'MeV' },
};

/** Alpha particles of 5.486 MeV and a fixed gold nucleus. */
export const ALPHA_ON_GOLD = {
  projectile: { species: 'alpha' },
  target: { kind: 'fixed', charge: 79 },
  energy: Q(5.486, 'MeV'),
  interaction: { terms: [{ form: 'coulomb' }] },
  methods: ['born1'],
  units: { area: 'barn', length: 'fm', energy: 'MeV' },
};

/** Everything said, nothing assumed. */
export const SAID = {
  efficiency: 1,
  deadTime: Q(0, 'us'),
  deadTimeModel: 'nonParalysable',
  backgroundRate: Q(0, '1/s'),
};

export const YUKAWA = {
  projectile: { species: 'electron' },
  target: { kind: 'fixed', charge: 0 },
  energy: Q(100, 'eV'),
  interaction: { terms: [{ form: 'yukawa', V0: Q(-10, 'eV'), a: Q(1, 'angstrom') }] },
  methods: ['born1'],
};

/** A thin target of a Yukawa scatterer with one detector. */
export function thinPlan(changes: object = {}, detector: object = {}) {
  return {
    estimate: YUKAWA,
    beam: { particlesPerSecond: 1e6, dutyFactor: 1 },
    foil: { arealDensity: Q(1e13, '1/cm2') },
    detectors: [{ name: 'D', angle: 40, solidAngle: 0.01, ...SAID, ...detector }],
    aim: { relativePrecision: 0.01 },
    ...changes,
  };
}
