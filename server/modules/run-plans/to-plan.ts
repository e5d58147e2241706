import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import type { BeamSent, RunPlanRequest } from '#shared/contracts/run-plans.ts';
import { toInternal } from '#shared/units/quantity.ts';
import { Faults } from '#server/modules/estimates/faults.ts';
import { toProblem } from '#server/modules/estimates/to-problem.ts';
import { particlesOfCurrent } from '#server/physics/counting/beam.ts';
import type { Particle, Problem } from '#server/physics/problem.ts';
import type {
  Plan,
  PlanContribution,
  PlannedCollision,
  PlanTarget,
  PlanDetector,
} from '#server/physics/plan.ts';
import { toDetectors } from './to-detectors.ts';
import { toUncertainties } from './to-uncertainties.ts';
import { toTargetOfRun } from './to-target.ts';

export const DEFAULT_PRECISION = 0.01;
const MOST_SPREAD = 0.2;

function ofCurrent(beam: BeamSent, projectile: Particle | undefined, faults: Faults): number {
  const { current, chargeState } = beam;
  if (!current) return NaN;
  if (projectile?.charge === 0) {
    faults.add(
      '/beam/current',
      `${projectile.label} has no charge, so the beam is no electric current; give particlesPerSecond.`,
    );
    return NaN;
  }
  if (chargeState === undefined) {
    faults.add(
      '/beam/chargeState',
      'An electric current needs the charge state of its particles: 1 nA are 6.24e9 of charge 1 a second, and half as many of charge 2.',
    );
    return NaN;
  }
  const most = Math.abs(projectile?.charge ?? chargeState);
  if (Math.abs(chargeState) > most) {
    faults.add(
      '/beam/chargeState',
      `${projectile?.label ?? 'The projectile'} has at most ${most} charges to carry, not ${Math.abs(chargeState)}.`,
    );
    return NaN;
  }
  return particlesOfCurrent(toInternal(current, 'current'), chargeState);
}

function toBeamRate(beam: BeamSent, projectile: Particle | undefined, faults: Faults): number {
  const { current, particlesPerSecond: rate } = beam;
  if (current && rate !== undefined) {
    faults.add(
      '/beam/particlesPerSecond',
      'Give the electric current with its charge state, or particlesPerSecond, not both.',
    );
    return NaN;
  }
  if (rate !== undefined) return typeof rate === 'number' ? rate : toInternal(rate, 'rate');
  if (current) return ofCurrent(beam, projectile, faults);
  faults.add('/beam', 'A beam needs its current with chargeState, or particlesPerSecond.');
  return NaN;
}

function toSpread(beam: BeamSent, energy: number, faults: Faults): number {
  const spread = beam.energySpread ? toInternal(beam.energySpread, 'energy') : 0;
  if (spread > MOST_SPREAD * energy) {
    faults.add(
      '/beam/energySpread',
      `A standard deviation of more than ${100 * MOST_SPREAD} % of the energy is no beam of one energy; plan it in several energies.`,
    );
  }
  return spread;
}

/** The estimate without what only its own answer needs: a plan asks for angles of its own. */
function collisionOf(
  estimate: EstimateRequest,
  method: RunPlanRequest['method'],
): PlannedCollision & { problem: Problem } {
  const chosen = method ?? estimate.methods[0] ?? 'born1';
  const body: EstimateRequest = {
    ...estimate,
    angles: { unit: 'deg', values: [90] },
    goldenRule: undefined,
    methods: [chosen],
  };
  const problem = toProblem(body);
  return {
    problem,
    method: chosen,
    problemAt: (energy) =>
      energy === problem.energy
        ? problem
        : toProblem({ ...body, energy: { value: energy, unit: 'eV' } }),
  };
}

function toContributions(
  request: RunPlanRequest,
  energy: number,
  target: PlanTarget,
  faults: Faults,
): PlanContribution[] {
  return (request.contributions ?? []).flatMap((sent, i) => {
    const path = `/contributions/${i}`;
    const collision = faults.within(`${path}/estimate`, () =>
      collisionOf(sent.estimate, sent.method ?? request.method),
    );
    const own = target.atoms.filter(
      ({ name, symbol }) => name === sent.scatterer || symbol === sent.scatterer,
    );
    if (own.length === 0) {
      const known = target.atoms.map(({ name }) => name).join(', ') || 'its formula is not given';
      faults.add(
        `${path}/scatterer`,
        `The target has no ${sent.scatterer} (${known}): a contribution is another element of the same target.`,
      );
    }
    if (sent.scatterer === target.scatterer) {
      faults.add(
        `${path}/scatterer`,
        `${sent.scatterer} is the scatterer of the plan itself; contributions are the other elements.`,
      );
    }
    if (!collision) return [];
    if (Math.abs(collision.problem.energy - energy) > 1e-9 * energy) {
      faults.add(
        `${path}/estimate/energy`,
        'A contribution is computed at the energy of the beam: give it the energy of the estimate.',
      );
    }
    const scatterers = own.reduce((sum, { arealDensity }) => sum + arealDensity, 0);
    return [{ scatterer: sent.scatterer, scatterers, ...collision }];
  });
}

/** The index of the monitor; null without one. */
function toMonitor(
  { monitor, detectors }: RunPlanRequest,
  planned: readonly PlanDetector[],
  faults: Faults,
): number | null {
  if (monitor === undefined) return null;
  const found = planned.findIndex(({ name }) => name === monitor);
  if (found >= 0 || planned.length < detectors.length) return found;
  faults.add('/monitor', `No detector is named ${monitor}: a monitor is one of the detectors.`);
  return null;
}

/**
 * The run a request asks for: units end here.
 * Throws DomainError('invalidInput') with all faults found, each with its JSON Pointer.
 */
export function toPlan(request: RunPlanRequest): Plan {
  const faults = new Faults();
  const collision = faults.within('/estimate', () => collisionOf(request.estimate, request.method));
  const problem = collision?.problem;
  const rate = toBeamRate(request.beam, problem?.projectile, faults);
  const spread = problem ? toSpread(request.beam, problem.energy, faults) : 0;
  const target = toTargetOfRun(request, problem?.target, faults);
  const detectors = toDetectors(request.detectors, faults);
  const contributions =
    problem && target ? toContributions(request, problem.energy, target, faults) : [];
  const monitor = toMonitor(request, detectors, faults);
  const uncertainties = toUncertainties(request, faults);
  faults.throwIfAny();
  if (!collision || !problem || !target) throw new Error('A fault was not recorded.');
  const { relativePrecision, beamTime } = request.aim ?? {};
  return {
    ...collision,
    beam: { rate, dutyFactor: request.beam.dutyFactor ?? 1, spread },
    target,
    detectors,
    contributions,
    aim: {
      precision: relativePrecision ?? DEFAULT_PRECISION,
      beamTime: beamTime ? toInternal(beamTime, 'time') : null,
    },
    uncertainties,
    monitor,
  };
}
