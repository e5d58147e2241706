import { rayOf } from './counting/aperture.ts';
import { spoken } from './counting/verdict.ts';
import { detectorWarnings } from './plan-detector-warnings.ts';
import { caution, degrees, info, ofDetectors, percent, targetPath } from './plan-words.ts';
import type { RunPlanResult } from './run-plan.ts';
import { nuclide } from './tables/nuclides.ts';
import type { Warning } from './warning.ts';

const SINGLE = 0.1;
/** Highland's angle against a third of the acceptance, or a fifth of the scattering angle. */
const OF_ACCEPTANCE = 3;
const OF_ANGLE = 5;

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
        space > Math.max(cone.halfAngle / OF_ACCEPTANCE, rayOf(cone) / OF_ANGLE),
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
      `${left.join(', ')} of the target scatter too and are not counted: add them as contributions, or see whether the detector tells their energies apart.`,
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
  'These figures are for planning counts only, not for shielding, dose, interlock or activation decisions: local radiation-protection rules and the licensed officer decide. Nuclear reactions, bremsstrahlung and activation are not part of them.',
);

/** What a run plan leaves out, rests on, or should be asked, in words. */
export function planWarnings(result: RunPlanResult): Warning[] {
  return [
    ...collisions(result),
    ...matter(result),
    ...energyLossChanges(result),
    ...detectorWarnings(result),
    ...otherElements(result),
    ...whoseNuclei(result),
    ...hopeless(result),
    PLANNING_ONLY,
  ];
}
