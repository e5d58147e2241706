import {
  neutronEntry,
  NEUTRON_EDITION,
  NEUTRON_WAVELENGTH,
} from '#server/physics/tables/neutron-lengths.ts';
import type { NeutronEntry } from '#server/physics/tables/neutron-lengths.ts';
import { contact, contactTerm, lengthB } from './contact.ts';
import { lookUp, readParameters, refuse, type ParameterReader } from './parameters.ts';
import type { AnyParameter, Form, FormContext, Term } from './types.ts';

const parameters: AnyParameter[] = [
  { ...lengthB, oneOf: 'length' },
  {
    key: 'nuclide',
    label: 'Nuclide',
    symbol: '{}^A\\mathrm X',
    dimension: 'nuclide',
    oneOf: 'length',
    default: 'V-51',
    description:
      'In place of b, for slow neutrons: the bound length of the table, times M/(m + M) where the target recoils.',
  },
  {
    key: 'element',
    label: 'Element',
    symbol: '\\mathrm X',
    dimension: 'element',
    oneOf: 'length',
    default: 'Ni',
    description:
      'In place of b, for slow neutrons: the mean bound length of the natural element, times M/(m + M) where the target recoils.',
  },
];

const FERMI = 1e-5;
/** 1 barn in angstrom². */
const BARN = 1e-8;

type Named = 'nuclide' | 'element';

/** The way that was chosen; that there is exactly one the declaration sees to. */
function chosen(read: ParameterReader): { key: Named; name: string } | { b: number } {
  for (const key of ['nuclide', 'element'] as const) {
    const name = read.name(key);
    if (name !== undefined) return { key, name };
  }
  return { b: read.need('b') };
}

function rowOf(key: Named, name: string): NeutronEntry {
  const isNuclide = /\d/.test(name);
  if (key === 'nuclide' && !isNuclide) {
    refuse(
      key,
      `${name} is no nuclide: write symbol and mass number, as in Ni-58, or give "element"`,
    );
  }
  if (key === 'element' && isNuclide) {
    refuse(key, `${name} is no element: write its symbol alone, as in Ni, or give "nuclide"`);
  }
  return lookUp(key, () => neutronEntry(name));
}

function refuseOthers(key: Named, { projectile }: FormContext): void {
  if (projectile === 'neutron') return;
  refuse(key, 'the table holds scattering lengths of slow neutrons: for another projectile give b');
}

function recoilFactor({ recoilFactor: factor }: FormContext): number {
  if (factor === undefined)
    throw new Error('the context of a contact term lacks its recoil factor');
  return factor;
}

/** Code of the note that says where a length came from. */
export const LENGTH_FROM_TABLE = 'lengthFromTable';

function fromTableNote(name: string, bound: number, factor: number) {
  const free = factor === 1 ? '' : `, times M/(m + M) = ${factor.toPrecision(6)} for its recoil`;
  return {
    code: LENGTH_FROM_TABLE,
    level: 'info' as const,
    message: `The bound scattering length of ${name} is ${bound} fm (${NEUTRON_EDITION})${free}.`,
  };
}

/** Shares of the scattering from which an absorption that is not counted is told, and from which it is a caution. */
const TOLD = 0.01;
const GRAVE = 0.1;

/** The table prints an imaginary part for strong absorbers only; what the others absorb is in no amplitude. */
function absorptionNote({ name, imaginary, ...row }: NeutronEntry) {
  const absorbed = row.sigmaAbsorption?.value ?? 0;
  const scattered = (row.sigmaCoherent?.value ?? 0) + (row.sigmaIncoherent?.value ?? 0);
  if (imaginary !== null || !(absorbed > TOLD * scattered)) return [];
  return [
    {
      code: 'absorptionLeftOut',
      level: absorbed > GRAVE * scattered ? ('caution' as const) : ('info' as const),
      message: `The absorption of ${name} is not in these numbers, for the table gives no imaginary length: ${absorbed} barn at ${NEUTRON_WAVELENGTH} angstrom, in proportion to the wavelength (${NEUTRON_EDITION}).`,
    },
  ];
}

/**
 * Contact term from the table of neutron scattering lengths.
 *
 * Formula: b = (b' - i b'') M/(m + M), incoherent = sigma_inc/4π (M/(m + M))²; the printed imaginary part absorbs.
 *
 * @throws DomainError invalidInput for projectiles other than neutrons, names that the table lacks, nuclides without a measured
 *   length, and resonant absorbers, whose complex b depends on the energy
 */
function fromTable(key: Named, name: string, context: FormContext): Term {
  refuseOthers(key, context);
  const row = rowOf(key, name);
  const { b, imaginary, resonant, sigmaIncoherent } = row;
  if (resonant) {
    refuse(
      key,
      `${name} has a resonance for slow neutrons: its complex scattering length depends on the energy, and the table knows it near 25 meV only. Give b at your wavelength`,
    );
  }
  if (b === null) {
    refuse(key, `no scattering length of ${name} has been measured (${NEUTRON_EDITION}): give b`);
  }
  const factor = recoilFactor(context);
  const length = { re: b.value * FERMI * factor, im: (imaginary ?? 0) * FERMI * factor };
  const incoherent =
    sigmaIncoherent === null
      ? undefined
      : (sigmaIncoherent.value * BARN * factor ** 2) / (4 * Math.PI);
  const term = contactTerm(length, context, incoherent);
  return { ...term, cautions: [fromTableNote(name, b.value, factor), ...absorptionNote(row)] };
}

/** `contact` with its length from the table as well as by hand. */
export const contactByName: Form<AnyParameter> = {
  ...contact,
  source: `${contact.source}; lengths: ${NEUTRON_EDITION}`,
  parameters,
  build(values, context) {
    const way = chosen(readParameters(parameters, values));
    if ('b' in way) return contactTerm({ re: way.b, im: 0 }, context);
    return fromTable(way.key, way.name, context);
  },
};
