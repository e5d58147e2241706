import type { Estimate, EstimateRequest, Integral, Warning } from '#shared/contracts/estimates.ts';
import type {
  MaterialAids,
  MaterialAidsRequest,
  MeanFreePath,
} from '#shared/contracts/material-aids.ts';
import { composedFactor } from '#shared/units/composed.ts';
import { toInternal, fromInternal } from '#shared/units/quantity.ts';
import { computeEstimate } from '#server/modules/estimates/compute-estimate.ts';
import { Faults } from '#server/modules/estimates/faults.ts';
import { toAngleRange } from '#server/modules/estimates/to-aids.ts';
import { askedAngles } from '#server/modules/estimates/to-angles.ts';
import { toProblem } from '#server/modules/estimates/to-problem.ts';
import { HBAR_C_EV_ANGSTROM } from '#server/physics/constants/codata2022.ts';
import { SLOW_NEUTRON_LIMIT } from '#server/physics/observables/neutron-sample.ts';
import type { Problem } from '#server/physics/problem.ts';
import { countOf } from '#server/physics/tables/formula.ts';
import { fittingLength } from './fitting-length.ts';
import { presentNeutronSample } from './present-neutron-sample.ts';
import type { Matter } from './to-material.ts';
import { toMatter, toScatterer } from './to-material.ts';

const SINGLE = 0.1;
const perCubicCentimetre = (perAngstrom3: number) => ({
  value: perAngstrom3 * composedFactor('1/angstrom3', '1/cm3'),
  unit: '1/cm3',
});

type CrossSection = { value: number; unit: string; relativeError?: number | undefined };

/** 1/(n σ), with n t σ where a thickness is given. */
function meanFreePath(
  { value, unit, relativeError }: CrossSection,
  scatterers: number,
  thickness: number | null,
): MeanFreePath {
  const sigma = toInternal({ value, unit }, 'area');
  if (!(sigma > 0))
    return { unavailable: true, reason: 'Nothing scatters here, so the path has no end.' };
  return {
    ...fittingLength(1 / (scatterers * sigma)),
    crossSection: { value, unit },
    ...(relativeError !== undefined && { relativeError }),
    ...(thickness !== null && { collisions: scatterers * sigma * thickness }),
  };
}

function ofTotal(
  { methods }: Estimate,
  scatterers: number,
  thickness: number | null,
): MeanFreePath {
  const born = methods.born1;
  if (!born || 'unavailable' in born) {
    return { unavailable: true, reason: born?.reason ?? 'First order was not asked for.' };
  }
  const total: Integral = born.total;
  if ('divergent' in total) return { divergent: true, reason: total.reason };
  return meanFreePath(total, scatterers, thickness);
}

function ofRange({ aids }: Estimate, scatterers: number, thickness: number | null): MeanFreePath {
  const between = aids?.elasticBetween;
  if (!between) throw new Error('a range was asked for and not answered');
  if ('unavailable' in between) return between;
  if ('divergent' in between) return { divergent: true, reason: between.reason };
  return meanFreePath(between, scatterers, thickness);
}

/** The wavelength of the beam in the lab, angstrom. */
const labWavelength = ({ collision }: Problem) =>
  (2 * Math.PI * HBAR_C_EV_ANGSTROM) / collision.momentumLab;

function neutronOf(
  problem: Problem,
  { formula, numberDensity }: Matter,
  request: MaterialAidsRequest,
  thickness: number | null,
): Pick<MaterialAids, 'neutron'> {
  if (problem.projectile.identity !== 'neutron') return {};
  if (problem.energy > SLOW_NEUTRON_LIMIT) {
    return {
      neutron: {
        unavailable: true,
        reason: `Bound lengths and the 1/v law hold for slow neutrons, below about ${SLOW_NEUTRON_LIMIT} eV; these have ${problem.energy.toPrecision(4)} eV.`,
      },
    };
  }
  const absorption = Object.fromEntries(
    Object.entries(request.absorption ?? {}).map(([name, q]) => [name, toInternal(q, 'area')]),
  );
  const wavelength = labWavelength(problem);
  return {
    neutron: presentNeutronSample({ formula, numberDensity, wavelength, absorption }, thickness),
  };
}

function warningsOf(
  aids: Pick<MaterialAids, 'meanFreePath' | 'material' | 'scatterer'>,
): Warning[] {
  const found: Warning[] = [];
  const { meanFreePath: path, material, scatterer } = aids;
  if ('collisions' in path && path.collisions !== undefined && path.collisions > SINGLE) {
    found.push({
      code: path.collisions > 1 ? 'singleScatteringNotValid' : 'multipleScattering',
      level: 'caution',
      message: `A particle collides ${Number(path.collisions.toPrecision(3))} times on average in this thickness: ${path.collisions > 1 ? 'single scattering is not valid' : 'more than a tenth scatters twice or is lost on the way; correct for it, or take a thinner sample'}.`,
    });
  }
  if (material.atoms.length > 1) {
    found.push({
      code: 'otherAtoms',
      level: 'info',
      message: `The path counts collisions with ${scatterer} only; the other atoms of ${material.formula} are not part of this case.`,
    });
  }
  return found;
}

function checkAbsorption(request: MaterialAidsRequest, matter: Matter, faults: Faults): void {
  for (const [name, { value }] of Object.entries(request.absorption ?? {})) {
    const path = `/absorption/${name}`;
    faults.within(path, () => countOf(matter.formula, name));
    if (!(value >= 0)) faults.add(path, 'An absorption cross section is at least zero.');
  }
}

/** A case in a material, in the units a person expects of each number. */
export function computeMaterialAids(request: MaterialAidsRequest): MaterialAids {
  const faults = new Faults();
  const { angleRange } = request;
  const body: EstimateRequest = {
    ...request.estimate,
    methods: ['born1'],
    ...(angleRange && { aids: { angleRange } }),
  };
  const problem = faults.within('/estimate', () => toProblem(body));
  const matter = toMatter(request.material, faults);
  const scatterer =
    matter && problem ? toScatterer(request, matter.formula, problem.target, faults) : null;
  if (matter) checkAbsorption(request, matter, faults);
  if (angleRange) toAngleRange(angleRange, askedAngles(body).unit, '/angleRange', faults);
  faults.throwIfAny();
  const answer = faults.within('/estimate', () => computeEstimate(body));
  faults.throwIfAny();
  if (!problem || !matter || !answer || scatterer === null) {
    throw new Error('A fault was not recorded.');
  }
  const { formula, numberDensity } = matter;
  const thickness = request.thickness ? toInternal(request.thickness, 'length') : null;
  const scatterers = numberDensity * countOf(formula, scatterer);
  const found = {
    material: {
      label: matter.label,
      formula: formula.text,
      density: matter.density === null ? null : fromInternal(matter.density, 'g/cm3', 'density'),
      units: perCubicCentimetre(numberDensity),
      atoms: formula.parts.map(({ name, count }) => ({
        name,
        count,
        numberDensity: perCubicCentimetre(numberDensity * count),
      })),
      source: matter.source,
      notes: matter.notes,
    },
    scatterer,
    meanFreePath: ofTotal(answer, scatterers, thickness),
    ...(angleRange && { between: ofRange(answer, scatterers, thickness) }),
    ...neutronOf(problem, matter, request, thickness),
  };
  return { ...found, warnings: warningsOf(found) };
}
