import { rayOf } from './counting/aperture.ts';
import type { Averages } from './counting/averages.ts';
import { angleSlope, attenuationSlope, averagesOf, energySlope } from './counting/averages.ts';
import type { CurveAt } from './counting/curve.ts';
import type { EnergyNode } from './counting/energies.ts';
import type { Slab } from './counting/slab.ts';
import type { CountedRates, Times } from './counting/times.ts';
import { recordedOf, timesForPrecision } from './counting/times.ts';
import type { UncertaintyLine } from './counting/uncertainty-lines.ts';
import { uncertaintyLines } from './counting/uncertainty-lines.ts';
import type { Plan, PlanDetector } from './plan.ts';
import type { SameAngle } from './target-checks.ts';
import { sameAngle } from './target-checks.ts';

export interface PlannedDetector {
  detector: PlanDetector;
  averages: Averages;
  /** beam · n/cos tilt · dσ/dΩ · Ω · efficiency at the central ray, 1/s; null where there is no cross section. */
  product: number | null;
  rates: CountedRates;
  observed: number;
  deadTimeFraction: number;
  contributions: { scatterer: string; rate: number }[];
  times: Times | null;
  lines: UncertaintyLine[];
  combined: number;
  /** Relative change of the signal per radian; null where there is none. */
  angleSlope: number | null;
  sameAngle: SameAngle[];
}

/** What every detector of a plan shares. */
export interface Shared {
  plan: Plan;
  curveAt: CurveAt;
  others: { scatterer: string; scatterers: number; curveAt: CurveAt }[];
  nodes: EnergyNode[];
  collisions: number;
}

/** What the particles of a detector cross, tilted towards its side. */
export function slabFor(
  { plan, collisions }: Pick<Shared, 'plan' | 'collisions'>,
  { side }: PlanDetector,
): Slab {
  const { kind, tilt } = plan.target;
  return { kind, collisions: collisions * Math.cos(tilt), tilt: side * tilt };
}

/** Beam particles a second times nuclei along the beam times solid angle and efficiency, sr/(angstrom² s). */
const exposure = ({ beam, target }: Plan, scatterers: number, detector: PlanDetector): number =>
  ((beam.rate * scatterers) / Math.cos(target.tilt)) * detector.solidAngle * detector.efficiency;

function otherRates(shared: Shared, detector: PlanDetector, slab: Slab) {
  const { plan, nodes } = shared;
  return shared.others.map(({ scatterer, scatterers, curveAt }) => {
    const { averaged, attenuation } = averagesOf(
      curveAt,
      plan.problem.energy,
      nodes,
      slab,
      detector.cone,
    );
    const rate = exposure(plan, scatterers, detector) * (averaged?.value ?? 0) * attenuation;
    return { scatterer, rate };
  });
}

function budgetOf(
  shared: Shared,
  planned: { rates: CountedRates; slope: number },
  d: PlanDetector,
) {
  const { plan, curveAt, nodes } = shared;
  if (Object.keys(plan.uncertainties).length === 0) return { lines: [], combined: 0 };
  const { energy } = plan.problem;
  const slab = slabFor(shared, d);
  const loses = nodes.some(({ depth }) => depth !== null);
  const byEnergy =
    plan.uncertainties.energy !== undefined || loses
      ? (energySlope(curveAt, energy, d.cone) ?? 0)
      : 0;
  const mean = nodes.reduce((sum, node) => sum + node.weight * node.energy, 0);
  const byThickness =
    1 + attenuationSlope(curveAt(energy), d.cone, slab) + (byEnergy * (mean - energy)) / energy;
  const { signal, background } = planned.rates;
  return uncertaintyLines(plan.uncertainties, {
    current: 1,
    thickness: byThickness,
    density: byThickness,
    efficiency: 1,
    solidAngle: 1,
    background: signal > 0 ? -background / signal : 0,
    energy: byEnergy,
    angle: (planned.slope * Math.PI) / 180,
  });
}

export function planDetector(shared: Shared, detector: PlanDetector): PlannedDetector {
  const { plan, curveAt, nodes } = shared;
  const { energy } = plan.problem;
  const slab = slabFor(shared, detector);
  const averages = averagesOf(curveAt, energy, nodes, slab, detector.cone);
  const size = exposure(plan, plan.target.scatterers, detector);
  const { averaged, point, attenuation } = averages;
  const contributions = otherRates(shared, detector, slab);
  const rates: CountedRates = {
    signal: size * (averaged?.value ?? 0) * attenuation,
    background: contributions.reduce((sum, { rate }) => sum + rate, detector.background),
    deadTime: detector.deadTime,
    dutyFactor: plan.beam.dutyFactor,
  };
  const observed = recordedOf(rates).gross;
  const all = rates.signal + rates.background;
  const slope = angleSlope(curveAt(energy), detector.cone);
  const { lines, combined } = budgetOf(shared, { rates, slope: slope ?? 0 }, detector);
  return {
    detector,
    averages,
    product: point.dcs && size * point.dcs.value,
    rates,
    observed,
    deadTimeFraction: all > 0 ? Math.max(0, 1 - observed / all) : 0,
    contributions,
    times: timesForPrecision(rates, plan.aim.precision),
    lines,
    combined,
    angleSlope: slope,
    sameAngle: sameAngle(plan, rayOf(detector.cone)),
  };
}

/** Why a detector has no time to plan with, in words. */
export function silence({ averages, rates }: PlannedDetector): string {
  if (averages.averaged === null) {
    return 'the cross section diverges inside its acceptance; move it away from the beam or add the screening of the electrons.';
  }
  if (rates.signal > 0) {
    return 'next to nothing of what is scattered leaves the target and is recorded.';
  }
  return averages.point.reason ?? 'no particle is scattered there.';
}
