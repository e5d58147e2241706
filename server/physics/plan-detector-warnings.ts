import { rayOf } from './counting/aperture.ts';
import { BEYOND_TOUCHING, closestApproach, nuclearReach } from './counting/closest-approach.ts';
import { exitCosine } from './counting/slab.ts';
import { labToCm } from './kinematics/frames.ts';
import { caution, ofDetectors, percent } from './plan-words.ts';
import type { PlannedDetector } from './planned-detector.ts';
import type { RunPlanResult } from './run-plan.ts';
import type { Warning } from './warning.ts';

const DEGREE = Math.PI / 180;
const DEAD = 0.1;

function grazing(result: RunPlanResult): Warning[] {
  const { target } = result.plan;
  if (target.kind === 'gas') return [];
  return ofDetectors(
    result,
    ({ detector: { cone, side } }) =>
      Math.abs(exitCosine(rayOf(cone), 0, side * target.tilt)) < Math.sin(DEGREE),
    (names, _, path) =>
      caution(
        'inPlaneOfFoil',
        `${names} stands in the plane of the foil, within a degree: what reaches it has crossed the foil along its whole width. Tilt the foil by 30 to 45 degrees.`,
        `${path}/angle`,
      ),
  );
}

function deadTimes(result: RunPlanResult): Warning[] {
  const { dutyFactor } = result.plan.beam;
  return [
    ...ofDetectors(
      result,
      ({ deadTimeFraction }) => deadTimeFraction > DEAD,
      (names, first, path) =>
        caution(
          'deadTime',
          `${names} misses ${percent(first.deadTimeFraction)} of the events by its dead time: the correction rests on the model of the counter. Lower the current or the solid angle until less than a tenth is lost.`,
          `${path}/deadTime`,
        ),
    ),
    ...ofDetectors(
      result,
      ({ rates: { signal, background, deadTime } }) =>
        deadTime.model === 'paralysable' && ((signal + background) / dutyFactor) * deadTime.tau > 1,
      (names, _, path) =>
        caution(
          'paralysed',
          `${names} is past the largest rate it can record: with more beam it counts less, and one recorded rate belongs to two true ones.`,
          `${path}/deadTime`,
        ),
    ),
    ...ofDetectors(
      result,
      ({ deadTimeFraction, detector }) =>
        dutyFactor < 1 && detector.deadTime.tau > 0 && deadTimeFraction > 0.01,
      (names) =>
        caution(
          'pulsedBeam',
          `The rates of ${names} while the beam is on are ${Number((1 / dutyFactor).toPrecision(3))} times their means, and dead time acts on those. If a pulse is shorter than the dead time, at most one event of it is counted and no formula for a steady beam holds.`,
          '/beam/dutyFactor',
        ),
    ),
  ];
}

/** Mass number of what the projectile meets: that of the target of the estimate, or of the scatterer. */
function massNumberOf({ plan }: RunPlanResult): number | null {
  const { target } = plan.problem;
  if (target.massNumber !== null) return target.massNumber;
  const atom = plan.target.atoms.find(
    ({ name, symbol }) => name === plan.target.scatterer || symbol === plan.target.scatterer,
  );
  return atom ? Math.round(atom.molarMass) : null;
}

function nuclearForces(result: RunPlanResult): Warning[] {
  const { problem } = result.plan;
  const { projectile, target, collision } = problem;
  const product = projectile.charge * target.charge;
  const a1 = projectile.massNumber;
  const a2 = massNumberOf(result);
  if (!(product > 0) || a1 === null || a2 === null) return [];
  const reach = nuclearReach(a1, a2);
  const nearest = ({ detector }: PlannedDetector) => {
    const ways = labToCm(rayOf(detector.cone), collision.frame);
    const furthest = Math.max(0, ...ways.map(({ thetaCm }) => thetaCm));
    return furthest > 0 ? closestApproach(product, collision.energyCm, furthest) : Infinity;
  };
  return ofDetectors(
    result,
    (one) => nearest(one) < reach,
    (names, first, path) =>
      caution(
        'nuclearForces',
        `Seen at ${names} the nuclei come as near as ${(nearest(first) * 1e5).toPrecision(3)} fm, within ${(reach * 1e5).toPrecision(3)} fm where nuclear forces begin (radii and ${BEYOND_TOUCHING} fm): the scattering is no longer that of two charges alone.`,
        `${path}/angle`,
      ),
  );
}

function silent(result: RunPlanResult): Warning[] {
  return ofDetectors(
    result,
    ({ averages }) => averages.averaged === null || averages.averaged.value === 0,
    (names, { averages }, path) =>
      caution(
        averages.averaged === null ? 'divergesInAcceptance' : 'outOfReach',
        averages.averaged === null
          ? `The cross section diverges inside the acceptance of ${names}: there is no rate. Move the detector away from the beam, or add the screening of the electrons.`
          : `${names} sees no scattered particle. ${averages.point.reason ?? ''}`.trim(),
        `${path}/angle`,
      ),
  );
}

const COARSE = 1e-3;

/** The error of an average is its own: a cross section that oscillates inside an acceptance, or energies that change it too much. */
function coarse(result: RunPlanResult): Warning[] {
  return ofDetectors(
    result,
    ({ averages: { averaged } }) =>
      averaged !== null && averaged.value > 0 && averaged.error > COARSE * averaged.value,
    (names, { averages: { averaged } }, path) =>
      caution(
        'averageUncertain',
        `The average at ${names} is known to ${percent((averaged?.error ?? 0) / (averaged?.value ?? 1))} only: the cross section changes too fast with angle or energy there. Narrow the acceptance or the spread.`,
        path,
      ),
  );
}

/** What single positions leave out, rest on, or should be asked, in words. */
export function detectorWarnings(result: RunPlanResult): Warning[] {
  return [
    ...grazing(result),
    ...deadTimes(result),
    ...nuclearForces(result),
    ...silent(result),
    ...coarse(result),
  ];
}
