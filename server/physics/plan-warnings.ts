import { closestApproach, nuclearReach } from './counting/closest-approach.ts';
import { BEYOND_TOUCHING } from './counting/closest-approach.ts';
import { exitCosine } from './counting/slab.ts';
import { spoken } from './counting/verdict.ts';
import { labToCm } from './kinematics/frames.ts';
import { nuclide } from './tables/nuclides.ts';
import type { PlannedDetector, RunPlanResult } from './run-plan.ts';
import type { Warning } from './warning.ts';

const DEGREE = Math.PI / 180;
const SINGLE = 0.1;
const DEAD = 0.1;
/** Highland's angle against a third of the acceptance, or a fifth of the scattering angle. */
const OF_ACCEPTANCE = 3;
const OF_ANGLE = 5;

const percent = (fraction: number) => `${Number((100 * fraction).toPrecision(2))} %`;
const degrees = (radians: number) => `${Number((radians / DEGREE).toPrecision(3))} degrees`;
const caution = (code: string, message: string, path?: string): Warning => ({
  code,
  level: 'caution',
  message,
  ...(path !== undefined && { path }),
});
const info = (code: string, message: string, path?: string): Warning => ({
  code,
  level: 'info',
  message,
  ...(path !== undefined && { path }),
});
const listed = (names: readonly string[]): string =>
  names.length > 4
    ? `${names.slice(0, 3).join(', ')} and ${names.length - 3} more`
    : names.join(', ');
const targetPath = ({ plan }: RunPlanResult) => (plan.target.kind === 'gas' ? '/gas' : '/foil');

/** One warning for all detectors it concerns. */
function ofDetectors(
  { detectors }: RunPlanResult,
  concerns: (one: PlannedDetector) => boolean,
  warn: (names: string, first: PlannedDetector, path: string) => Warning,
): Warning[] {
  const found = detectors.filter(concerns);
  const [first] = found;
  if (!first) return [];
  const names = listed(found.map(({ detector }) => detector.name));
  return [warn(names, first, `/detectors/${detectors.indexOf(first)}`)];
}

function collisions(result: RunPlanResult): Warning[] {
  const { collisions: n, collisionsBeyond: beyond } = result;
  const found: Warning[] = [];
  const counted = beyond === null ? '' : ` by more than ${degrees(beyond)}`;
  if (n > SINGLE) {
    const words =
      n > 1
        ? 'single scattering is not valid, and the rates below are those of a target that it would be valid for'
        : 'more than a tenth scatters twice or is lost on the way; correct for it, or take a thinner target';
    found.push(
      caution(
        n > 1 ? 'singleScatteringNotValid' : 'multipleScattering',
        `A beam particle is scattered${counted} ${Number(n.toPrecision(3))} times on average in this target: ${words}.`,
        targetPath(result),
      ),
    );
  }
  if (beyond !== null) {
    found.push(
      info(
        'totalBeyondAngle',
        `The total cross section diverges. Collisions, and what is lost by them, are counted beyond ${degrees(beyond)} in the lab: the smallest acceptance, or a fifth of the smallest angle where that is larger.`,
        '/estimate/interaction/terms',
      ),
    );
  }
  return found;
}

function matter(result: RunPlanResult): Warning[] {
  const { checks, plan } = result;
  const found: Warning[] = [];
  if (plan.problem.projectile.charge === 0) return found;
  if ('none' in checks.loss) {
    found.push(
      caution(
        'noEnergyLoss',
        `No energy loss is taken in the target: ${checks.loss.none}.`,
        targetPath(result),
      ),
    );
  }
  if ('none' in checks.multipleScattering) {
    found.push(
      info(
        'noMultipleScatteringAngle',
        `No angle of multiple scattering is given: ${checks.multipleScattering.none}.`,
        targetPath(result),
      ),
    );
    return found;
  }
  const space = Math.SQRT2 * checks.multipleScattering.angle;
  return [
    ...found,
    ...ofDetectors(
      result,
      ({ detector: { cone } }) =>
        space > Math.max(cone.halfAngle / OF_ACCEPTANCE, cone.theta / OF_ANGLE),
      (names, _, path) =>
        caution(
          'multipleScatteringAngle',
          `Multiple scattering turns particles by ${degrees(space)} in this target (Highland, in space), more than a third of the acceptance and a fifth of the angle of ${names}: single scattering does not describe that position.`,
          path,
        ),
    ),
  ];
}

function energyLossChanges(result: RunPlanResult): Warning[] {
  const { checks, plan } = result;
  if (!('lossTo' in checks.loss)) return [];
  const lost = checks.loss.lossTo(1);
  return ofDetectors(
    result,
    ({ averages: { acceptance, averaged } }) =>
      acceptance !== null &&
      averaged !== null &&
      acceptance.value > 0 &&
      Math.abs(averaged.value / acceptance.value - 1) > plan.aim.precision,
    (names, first) => {
      const { averaged, acceptance } = first.averages;
      const change = (averaged?.value ?? 0) / (acceptance?.value ?? 1) - 1;
      return caution(
        'energyLossMatters',
        `The beam loses ${percent(lost / plan.problem.energy)} of its energy in the target; with its spread that changes the cross section at ${names} by ${percent(change)}, more than the precision aimed at. It is averaged over, but depends on the loss: take a thinner target.`,
        targetPath(result),
      );
    },
  );
}

function grazing(result: RunPlanResult): Warning[] {
  const { target } = result.plan;
  if (target.kind === 'gas') return [];
  return ofDetectors(
    result,
    ({ detector: { cone, side } }) =>
      Math.abs(exitCosine(cone.theta, 0, side * target.tilt)) < Math.sin(DEGREE),
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
    const ways = labToCm(detector.cone.theta, collision.frame);
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

function otherElements(result: RunPlanResult): Warning[] {
  const { target, contributions } = result.plan;
  const own = target.scatterer.split('-')[0] ?? '';
  const counted = new Set([own, ...contributions.map(({ scatterer }) => scatterer.split('-')[0])]);
  const left = [
    ...new Set(target.atoms.map(({ symbol }) => symbol).filter((symbol) => !counted.has(symbol))),
  ];
  if (left.length === 0) return [];
  return [
    caution(
      'otherElements',
      `${left.join(', ')} of the target scatter too and are not counted: add them as contributions, or see whether the detector tells their energies apart (sameAngle).`,
      '/contributions',
    ),
  ];
}

function whoseNuclei(result: RunPlanResult): Warning[] {
  const { problem, target } = result.plan;
  const identity = problem.target.identity;
  if (identity === null || target.atoms.length === 0) return [];
  const [own = ''] = identity.split('-');
  const [symbol = '', mass] = target.scatterer.split('-');
  if (own !== symbol && !['proton', 'neutron', 'electron'].includes(identity)) {
    return [
      caution(
        'otherTarget',
        `The estimate is computed for ${problem.target.label}, the run counts nuclei of ${target.scatterer}: one of them is meant.`,
        `${targetPath(result)}/scatterer`,
      ),
    ];
  }
  const isNuclide = /-\d+$/.test(identity);
  if (own !== symbol || mass !== undefined || !isNuclide) return [];
  const abundance = nuclide(identity).abundance ?? 0;
  const isPure = target.atoms.some(({ name }) => name === identity) || abundance > 0.999;
  if (isPure) return [];
  return [
    info(
      'isotopesTogether',
      `All isotopes of ${symbol} are counted as ${identity}, ${percent(abundance)} of the natural mixture: name the isotope as scatterer, or give isotopes, where they differ.`,
      `${targetPath(result)}/scatterer`,
    ),
  ];
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

function hopeless({ totalTime, plan }: RunPlanResult): Warning[] {
  const year = 365.25 * 86_400;
  if (totalTime === null || totalTime <= year) return [];
  return [
    caution(
      'hopeless',
      `The precision takes ${spoken(totalTime)} of beam, more than a year: raise current, thickness or solid angle, go forward in angle, or aim at less than ${percent(plan.aim.precision)}.`,
      '/aim/relativePrecision',
    ),
  ];
}

const PLANNING_ONLY: Warning = info(
  'planningOnly',
  'These figures are for planning counts only, not for shielding, dose, interlock or activation decisions: local radiation-protection rules and the responsible officer decide. Nuclear reactions, bremsstrahlung and activation are not part of them.',
);

/** What a run plan leaves out, rests on, or should be asked, in words. */
export function planWarnings(result: RunPlanResult): Warning[] {
  return [
    ...collisions(result),
    ...matter(result),
    ...energyLossChanges(result),
    ...grazing(result),
    ...deadTimes(result),
    ...nuclearForces(result),
    ...otherElements(result),
    ...whoseNuclei(result),
    ...silent(result),
    ...hopeless(result),
    PLANNING_ONLY,
  ];
}
