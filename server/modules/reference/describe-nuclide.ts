import type { NuclideDetail } from '#shared/contracts/reference.ts';
import { DomainError } from '#shared/errors.ts';
import { NEUTRON_ENTRIES, neutronEntry } from '#server/physics/tables/neutron-lengths.ts';
import { NUCLEAR_CHARGES } from '#server/physics/tables/nuclear-charge.ts';
import { NUCLIDES, naturalIsotopes, nuclearMassEnergy } from '#server/physics/tables/nuclides.ts';
import { speciesOfNuclide } from '#server/physics/tables/species.ts';
import { presentNeutron } from './list-neutron-lengths.ts';
import { presentNuclide } from './list-nuclides.ts';
import { HEADS } from './table-heads.ts';

const fm = (value: number) => ({ value, unit: 'fm' });

function chargeOf(name: string): NuclideDetail['charge'] {
  const found = NUCLEAR_CHARGES.find(({ nuclide }) => nuclide === name);
  if (!found) return null;
  const { rms, rmsSource, fermi } = found;
  return {
    rms: fm(rms),
    rmsSource,
    fermi: fermi && { c: fm(fermi.c), a: fm(fermi.a), origin: fermi.origin, check: fermi.check },
  };
}

/** The isotope's own row, or that of its element where it is the only isotope in nature and the table prints it once. */
function neutronOf(name: string, symbol: string): NuclideDetail['neutron'] {
  const [only, ...others] = naturalIsotopes(symbol);
  const alone = only?.name === name && others.length === 0;
  const known = NEUTRON_ENTRIES.some((entry) => entry.name === name);
  if (known) return presentNeutron(neutronEntry(name));
  const element = NEUTRON_ENTRIES.find((entry) => alone && entry.name === symbol);
  return element ? presentNeutron(element) : null;
}

/** Everything the tables know of one nuclide. Throws DomainError('notFound') for one they do not have. */
export function describeNuclide(name: string): NuclideDetail {
  const entry = NUCLIDES.find((nuclide) => nuclide.name === name);
  if (!entry) {
    throw new DomainError('notFound', `There is no ${name} in the table of nuclides.`);
  }
  const charge = chargeOf(name);
  const neutron = neutronOf(name, entry.symbol);
  return {
    ...presentNuclide(entry),
    nuclearMass: { value: Number((nuclearMassEnergy(entry) / 1e6).toPrecision(12)), unit: 'MeV' },
    species: speciesOfNuclide(name)?.label ?? null,
    charge,
    neutron,
    isotopes: naturalIsotopes(entry.symbol).map(presentNuclide),
    tables: [
      HEADS.nuclides,
      ...(charge ? [HEADS.nuclearCharge] : []),
      ...(neutron ? [HEADS.neutronLengths] : []),
    ],
  };
}
