import type { FoilSent, GasSent, RunPlanBody } from '#shared/contracts/run-plans.ts';
import { arealMassToInternal, toInternal } from '#shared/units/quantity.ts';
import { isArealMassUnit } from '#shared/units/vocabulary.ts';
import type { Faults } from '#server/modules/estimates/faults.ts';
import { AVOGADRO } from '#server/physics/constants/codata2022.ts';
import type { Particle } from '#server/physics/problem.ts';
import type { PlanTarget, TargetAtom } from '#server/physics/plan.ts';
import type { Formula } from '#server/physics/tables/formula.ts';
import { parseFormula } from '#server/physics/tables/formula.ts';
import { gasUnitsPerVolume, unitsPerVolume } from '#server/physics/tables/materials.ts';
import { electronsPerGram, meanExcitationOf } from '#server/physics/tables/mean-excitation.ts';
import { radiationLengthOf } from '#server/physics/tables/radiation-length.ts';
import { DomainError } from '#shared/errors.ts';
import { nucleiOf, withIsotopes } from './to-scatterer.ts';

const DEGREE = Math.PI / 180;
/** 1/cm² in 1/angstrom². */
const PER_CM2 = 1e-16;

/** Formula units along the normal, 1/angstrom², or null with faults. */
function unitsOfFoil(foil: FoilSent, formula: Formula, faults: Faults): number | null {
  const { arealDensity, density, thickness } = foil;
  if (arealDensity) {
    if (!isArealMassUnit(arealDensity.unit)) return null;
    return (arealMassToInternal(arealDensity) * AVOGADRO * PER_CM2) / formula.molarMass;
  }
  if (!density || !thickness) {
    const missing = density ? 'thickness' : 'density';
    faults.add(
      `/foil/${missing}`,
      `A foil needs its ${missing}: give density and thickness, or arealDensity in their place.`,
    );
    return null;
  }
  const perVolume = faults.within('/foil/density', () =>
    unitsPerVolume(formula, toInternal(density, 'density')),
  );
  return perVolume === undefined ? null : perVolume * toInternal(thickness, 'length');
}

function bothWays({ arealDensity, thickness }: FoilSent, faults: Faults): void {
  if (!arealDensity || !thickness) return;
  faults.add(
    '/foil/thickness',
    'Give the areal density or the thickness, not both: one of them decides how many nuclei there are.',
  );
}

function matterOf(formula: Formula, units: number): NonNullable<PlanTarget['matter']> {
  let stopping: NonNullable<PlanTarget['matter']>['stopping'] = null;
  try {
    stopping = {
      electronsPerGram: electronsPerGram(formula),
      excitation: meanExcitationOf(formula),
    };
  } catch (fault) {
    if (!(fault instanceof DomainError)) throw fault;
  }
  return {
    mass: (units * formula.molarMass) / (AVOGADRO * PER_CM2),
    radiationLength: radiationLengthOf(formula),
    stopping,
  };
}

const atomsOf = ({ parts }: Formula, units: number): TargetAtom[] =>
  parts.map(({ name, symbol, count, molarMass }) => ({
    name,
    symbol,
    molarMass,
    arealDensity: units * count,
  }));

interface Where {
  path: '/foil' | '/gas';
  kind: PlanTarget['kind'];
  tilt: number;
}

function fromUnits(
  sent: FoilSent | GasSent,
  formula: Formula,
  units: number,
  { path, kind, tilt }: Where,
  projectileMeets: Particle | undefined,
  faults: Faults,
): PlanTarget | undefined {
  const atoms = atomsOf(formula, units);
  const found = nucleiOf({ sent, formula, target: projectileMeets, path }, faults);
  if (!found) return undefined;
  return {
    kind,
    tilt,
    scatterer: found.scatterer,
    scatterers: units * found.count,
    atoms,
    matter: matterOf(formula, units),
  };
}

function fromFoil(foil: FoilSent, target: Particle | undefined, faults: Faults) {
  bothWays(foil, faults);
  const where: Where = { path: '/foil', kind: 'foil', tilt: (foil.tilt ?? 0) * DEGREE };
  const { arealDensity, formula: text } = foil;
  if (text === undefined) {
    if (!arealDensity || isArealMassUnit(arealDensity.unit)) {
      const why = arealDensity
        ? `An areal density by mass (${arealDensity.unit}) needs the formula of the target to become a number of nuclei.`
        : 'A foil needs its formula, density and thickness, or an areal density of scatterers such as {"value": 1e18, "unit": "1/cm2"}.';
      faults.add('/foil/formula', why);
      return undefined;
    }
    return byNumber(foil, where, target);
  }
  const formula = faults.within('/foil/formula', () =>
    withIsotopes(parseFormula(text), foil.isotopes, '/foil', faults),
  );
  if (!formula) return undefined;
  const units = unitsOfFoil(foil, formula, faults);
  if (units !== null) return fromUnits(foil, formula, units, where, target, faults);
  if (!arealDensity || isArealMassUnit(arealDensity.unit)) return undefined;
  // By number the areal density is that of the scatterers; the rest of the formula follows.
  const found = nucleiOf({ sent: foil, formula, target, path: '/foil' }, faults);
  if (!found) return undefined;
  const scatterers = toInternal(arealDensity, 'arealDensity') * PER_CM2;
  return fromUnits(foil, formula, scatterers / found.count, where, target, faults);
}

function byNumber(
  { arealDensity, scatterer }: FoilSent,
  { kind, tilt }: Where,
  target: Particle | undefined,
): PlanTarget | undefined {
  if (!arealDensity) return undefined;
  const scatterers = toInternal(arealDensity, 'arealDensity') * PER_CM2;
  const name = scatterer ?? target?.label ?? 'scatterers';
  return { kind, tilt, scatterer: name, scatterers, atoms: [], matter: null };
}

function fromGas(gas: GasSent, target: Particle | undefined, faults: Faults) {
  const formula = faults.within('/gas/formula', () =>
    withIsotopes(parseFormula(gas.formula), gas.isotopes, '/gas', faults),
  );
  const perVolume = faults.within('/gas/pressure', () =>
    gasUnitsPerVolume(
      toInternal(gas.pressure, 'pressure'),
      toInternal(gas.temperature, 'temperature'),
    ),
  );
  if (!formula || perVolume === undefined) return undefined;
  const units = perVolume * toInternal(gas.length, 'length');
  const where: Where = { path: '/gas', kind: 'gas', tilt: 0 };
  return fromUnits(gas, formula, units, where, target, faults);
}

/** The target of a run, or faults at its fields. */
export function toTargetOfRun(
  { foil, gas }: Pick<RunPlanBody, 'foil' | 'gas'>,
  target: Particle | undefined,
  faults: Faults,
): PlanTarget | undefined {
  if (foil && gas) {
    faults.add('/gas', 'A run has one target: give a foil or a gas, not both.');
    return undefined;
  }
  if (foil) return fromFoil(foil, target, faults);
  if (gas) return fromGas(gas, target, faults);
  faults.add('/foil', 'A run needs a target: give a foil, or a gas in its place.');
  return undefined;
}
