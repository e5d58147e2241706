import { acceptanceAverage } from './counting/acceptance.ts';
import type { Cone } from './counting/cone.ts';
import type { Curve, CurveAt } from './counting/curve.ts';
import { transmittedShare } from './counting/averages.ts';
import type { Slab } from './counting/slab.ts';
import type { Generator } from './counting/statistics/generator.ts';
import { standardDraw } from './counting/statistics/monte-carlo.ts';
import type { UncertainInput } from './counting/uncertainty-lines.ts';
import { DomainError } from '#shared/errors.ts';
import type { RunPlanResult } from './run-plan.ts';
import { curvesOf, meanLossOf, slabOf } from './run-plan.ts';

const DEGREE = Math.PI / 180;
/** Every input relative to its planned value, the angle as an offset in rad. */
const PLANNED: Readonly<Record<UncertainInput, number>> = {
  current: 1,
  thickness: 1,
  density: 1,
  efficiency: 1,
  solidAngle: 1,
  background: 1,
  energy: 1,
  angle: 0,
};
/** Nodes and reach, in standard uncertainties, of the table that is drawn from. */
const NODES = 7;
const REACH = 6;
/** Histogram ends, in combined uncertainties about 1. */
const SPAN = 10;

/** Signal rate of a detector relative to the planned one, for draws of its inputs; background taken off as it is believed to be. */
export interface TrialModel {
  draw: (random: Generator) => number;
  range: { from: number; to: number };
  /** 1/s: what 1 stands for. */
  rate: number;
}

/** Coefficients of T_k of the polynomial through values at Chebyshev points of [-1, 1]. */
function chebyshevCoefficients(values: readonly number[]): Float64Array {
  const n = values.length;
  return Float64Array.from({ length: n }, (_, k) => {
    let sum = 0;
    values.forEach((value, i) => (sum += value * Math.cos((Math.PI * k * (2 * i + 1)) / (2 * n))));
    return (sum * (k === 0 ? 1 : 2)) / n;
  });
}

/** Σ c_k T_k(x) by Clenshaw's recurrence. */
function chebyshevSum(c: Float64Array, x: number): number {
  let next = 0;
  let after = 0;
  for (let k = c.length - 1; k > 0; k--) {
    const here = (c[k] ?? 0) + 2 * x * next - after;
    after = next;
    next = here;
  }
  return (c[0] ?? 0) + x * next - after;
}

const chebyshev = (count: number) =>
  count === 1
    ? [0]
    : Array.from({ length: count }, (_, i) => Math.cos((Math.PI * (2 * i + 1)) / (2 * count)));
const folded = (theta: number) => Math.PI - Math.abs(Math.PI - Math.abs(theta));
const clamped = (x: number) => Math.min(1, Math.max(-1, x));

function unbounded(): never {
  throw new DomainError(
    'invalidInput',
    'Within six times the uncertainty of angle and energy the detector has no rate, or an unbounded one: no distribution of it can be drawn.',
  );
}

/** ln of the averaged cross section over energy (relative) and angle (rad) around those of the plan, from a table. */
function logTable(
  curveAt: CurveAt,
  energy: number,
  cone: Cone,
  reach: { energy: number; angle: number },
): (energyRatio: number, angle: number) => number {
  if (curveAt(energy).forwardDiverges && cone.theta - reach.angle <= cone.halfAngle) {
    unbounded();
  }
  const rows = chebyshev(reach.energy > 0 ? NODES : 1).map((e) => {
    const curve = curveAt(energy * (1 + e * reach.energy));
    const values = chebyshev(reach.angle > 0 ? NODES : 1).map((a) => {
      const mean = acceptanceAverage(curve, {
        ...cone,
        theta: folded(cone.theta + a * reach.angle),
      });
      if (mean === null || !(mean.value > 0)) {
        unbounded();
      }
      return Math.log(mean.value);
    });
    return chebyshevCoefficients(values);
  });
  // Coefficients over the angle for each energy become coefficients over both.
  const byAngle = Array.from(rows[0] ?? [], (_, k) =>
    chebyshevCoefficients(rows.map((row) => row[k] ?? 0)),
  );
  const column = new Float64Array(byAngle.length);
  return (energyRatio, angle) => {
    const a = reach.angle > 0 ? clamped(angle / reach.angle) : 0;
    const e = reach.energy > 0 ? clamped((energyRatio - 1) / reach.energy) : 0;
    for (let k = 0; k < column.length; k++) {
      column[k] = chebyshevSum(byAngle[k] ?? column, e);
    }
    return chebyshevSum(column, a);
  };
}

/**
 * What is drawn in a Monte Carlo run for one detector of a plan.
 *
 * Formula: current · thickness · density · efficiency · Ω · T(thickness · density) · <dσ/dΩ>(E, θ) - (B/S)(background - 1), each relative to
 * its planned value; the energy inside the target follows the thickness.
 *
 * @param result of the plan
 * @param index of the detector
 * @throws DomainError('invalidInput') where the detector has no rate, or no uncertainties are given
 *
 * Validity: inputs independent of one another; angle and energy from a table of 7 × 7 nodes over six standard uncertainties.
 *
 * Source: JCGM 101:2008.
 */
export function trialModel(result: RunPlanResult, index: number): TrialModel {
  const { plan } = result;
  const planned = result.detectors[index];
  const { uncertainties } = plan;
  const given = Object.keys(uncertainties) as UncertainInput[];
  if (!planned || !(planned.rates.signal > 0)) {
    throw new DomainError(
      'invalidInput',
      'The detector has no rate whose distribution could be drawn.',
    );
  }
  if (given.length === 0) {
    throw new DomainError(
      'invalidInput',
      'Give the uncertainties of the inputs first: nothing varies without them.',
    );
  }
  const { cone } = planned.detector;
  const { energy } = plan.problem;
  const lossShare = meanLossOf(result) / energy;
  const thick =
    REACH * Math.hypot(uncertainties.thickness?.value ?? 0, uncertainties.density?.value ?? 0);
  const reach = {
    energy: Math.min(0.5, REACH * (uncertainties.energy?.value ?? 0) + lossShare * thick),
    angle: REACH * (uncertainties.angle?.value ?? 0) * DEGREE,
  };
  const curveAt = curvesOf(plan);
  const log = logTable(curveAt, energy, cone, reach);
  const slab = slabOf(result, planned.detector);
  const center = log(1, 0);
  const ratio = planned.rates.background / planned.rates.signal;
  const x: Record<UncertainInput, number> = { ...PLANNED };
  const varied = given.flatMap((input) => {
    const known = uncertainties[input];
    const scale = input === 'angle' ? DEGREE : 1;
    return known ? [{ input, known, scale: known.value * scale }] : [];
  });
  const transmission = transmissionRatio(curveAt(energy), cone, slab, Math.min(0.95, thick));
  const draw = (random: Generator) => {
    for (const { input, known, scale } of varied) {
      x[input] = PLANNED[input] + scale * standardDraw(random, known);
    }
    const thickness = Math.max(0, x.thickness * x.density);
    const energyRatio = x.energy - lossShare * (thickness - 1);
    const shape = Math.exp(log(energyRatio, x.angle) - center);
    const others = x.current * thickness * x.efficiency * x.solidAngle;
    return others * transmission(thickness) * shape - ratio * (x.background - 1);
  };
  const span = SPAN * Math.max(planned.combined, 1e-6);
  return { draw, range: { from: 1 - span, to: 1 + span }, rate: planned.rates.signal };
}

/** What leaves the target relative to the planned thickness, from a table over it. */
function transmissionRatio(
  curve: Curve,
  cone: Cone,
  slab: Slab,
  reach: number,
): (thickness: number) => number {
  const planned = transmittedShare(curve, cone, slab, 1);
  if (!(planned > 0 && reach > 0)) return () => 1;
  const c = chebyshevCoefficients(
    chebyshev(NODES).map((t) =>
      Math.log(transmittedShare(curve, cone, slab, 1 + t * reach) / planned),
    ),
  );
  return (thickness) => Math.exp(chebyshevSum(c, clamped((thickness - 1) / reach)));
}
