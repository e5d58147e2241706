import type { MaterialAidsRequest, MaterialChoice } from '#shared/contracts/material-aids.ts';
import { toInternal } from '#shared/units/quantity.ts';
import type { Faults } from '#server/modules/estimates/faults.ts';
import type { Particle } from '#server/physics/problem.ts';
import type { Formula } from '#server/physics/tables/formula.ts';
import { countOf, parseFormula } from '#server/physics/tables/formula.ts';
import {
  MATERIALS_EDITION,
  gasUnitsPerVolume,
  material,
  unitsPerVolume,
} from '#server/physics/tables/materials.ts';

/** A material with its units ended. */
export interface Matter {
  label: string;
  formula: Formula;
  /** g/cm³; null for a gas, whose number follows from pressure and temperature. */
  density: number | null;
  /** Formula units per angstrom³. */
  numberDensity: number;
  source: string;
  notes: string;
}

type Conditions = Extract<MaterialChoice, { key: string }>;

function gasOf({ pressure, temperature }: Conditions, faults: Faults): number | null {
  if (!pressure || !temperature) {
    const missing = pressure ? 'temperature' : 'pressure';
    faults.add(
      `/material/${missing}`,
      'A gas needs its pressure and temperature, such as {"value": 1, "unit": "bar"} and {"value": 293.15, "unit": "K"}.',
    );
    return null;
  }
  return (
    faults.within('/material/pressure', () =>
      gasUnitsPerVolume(toInternal(pressure, 'pressure'), toInternal(temperature, 'temperature')),
    ) ?? null
  );
}

function fromTable(choice: Conditions, faults: Faults): Matter | null {
  const entry = faults.within('/material/key', () => material(choice.key));
  if (!entry) return null;
  const formula = parseFormula(entry.formula);
  const common = {
    label: entry.label,
    formula,
    source: `${entry.source} (${MATERIALS_EDITION})`,
    notes: entry.notes,
  };
  if (entry.density === null && !choice.density) {
    const numberDensity = gasOf(choice, faults);
    return numberDensity === null ? null : { ...common, density: null, numberDensity };
  }
  const density = choice.density ? toInternal(choice.density, 'density') : (entry.density ?? 0);
  const numberDensity = faults.within('/material/density', () => unitsPerVolume(formula, density));
  const source = choice.density ? 'Density as given' : common.source;
  return numberDensity === undefined ? null : { ...common, source, density, numberDensity };
}

function fromFormula(
  choice: Exclude<MaterialChoice, { key: string }>,
  faults: Faults,
): Matter | null {
  const formula = faults.within('/material/formula', () => parseFormula(choice.formula));
  if (!formula) return null;
  const common = { label: choice.formula, formula, notes: '' };
  if ('density' in choice) {
    const density = toInternal(choice.density, 'density');
    const numberDensity = faults.within('/material/density', () =>
      unitsPerVolume(formula, density),
    );
    if (numberDensity === undefined) return null;
    return { ...common, density, numberDensity, source: 'Formula and density as given' };
  }
  const numberDensity = gasOf({ key: '', ...choice }, faults);
  if (numberDensity === null) return null;
  return { ...common, density: null, numberDensity, source: 'Ideal gas at the pressure given' };
}

/** The material that was chosen, or faults at its fields. */
export function toMatter(choice: MaterialChoice, faults: Faults): Matter | null {
  return 'key' in choice ? fromTable(choice, faults) : fromFormula(choice, faults);
}

/** The kind of atom the case describes: the one named, the target's own, or the only one there is. */
export function toScatterer(
  { scatterer }: Pick<MaterialAidsRequest, 'scatterer'>,
  formula: Formula,
  target: Particle,
  faults: Faults,
): string | null {
  if (scatterer !== undefined) {
    return faults.within('/scatterer', () => countOf(formula, scatterer)) === undefined
      ? null
      : scatterer;
  }
  const { parts } = formula;
  const symbol = target.identity?.split('-')[0];
  const own = parts.find(({ name }) => name === target.identity || name === symbol);
  const [only, ...others] = parts;
  if (own) return own.name;
  if (only && others.length === 0) return only.name;
  faults.add(
    '/scatterer',
    `Say which atoms of ${formula.text} the case describes: ${parts.map(({ name }) => name).join(', ')}.`,
  );
  return null;
}
