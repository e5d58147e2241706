import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { InteractionTerm } from '#shared/contracts/estimates.ts';
import { startingParameters } from '#shared/contracts/forms.ts';
import type { Start, StartKind } from '#shared/contracts/reference.ts';
import { DomainError } from '#shared/errors.ts';
import { summarise } from '#server/documents/summarise.ts';
import { presentForm } from '#server/modules/forms/present-forms.ts';
import { formByKey } from '#server/physics/potentials/register.ts';
import { parseFormula } from '#server/physics/tables/formula.ts';
import { material } from '#server/physics/tables/materials.ts';
import { boundLength, neutronEntry } from '#server/physics/tables/neutron-lengths.ts';
import { atomicNumber, nuclide } from '#server/physics/tables/nuclides.ts';
import { thomasFermiLength } from '#server/physics/tables/screening.ts';
import { species } from '#server/physics/tables/species.ts';
import { mainIsotope } from './list-elements.ts';
import { beamFor } from './start-beams.ts';
import type { Beam } from './start-beams.ts';

const WHOLE = { unit: 'deg', from: 0, to: 180, count: 181 } as const;
/** Where charges meet, forward angles are left out: they would hide the rest of the curve. */
const BACKWARD = { unit: 'deg', from: 10, to: 180, count: 171 } as const;

const ATOMS = { length: 'angstrom', area: 'angstrom2', energy: 'eV' } as const;
const NUCLEI = { length: 'fm', area: 'barn', energy: 'MeV' } as const;
const NEUTRONS = { length: 'fm', area: 'barn', energy: 'meV' } as const;

const ALPHA: Beam = {
  projectile: { species: 'alpha' },
  target: { kind: 'nuclide', nuclide: 'Au-197' },
  energy: { value: 2, unit: 'MeV' },
};
const SLOW_NEUTRON: Beam = {
  projectile: { species: 'neutron' },
  target: { kind: 'fixed', charge: 0 },
  energy: { value: 25.3, unit: 'meV' },
};

function documentOf(
  beam: Beam,
  term: InteractionTerm,
  rest: Pick<CaseDocument, 'angles' | 'units'>,
): CaseDocument {
  return {
    format: 1,
    kinematics: 'nonrelativistic',
    frame: 'cm',
    methods: ['born1'],
    ...beam,
    interaction: { terms: [term] },
    ...rest,
  };
}

const begun = (title: string, document: CaseDocument): Start => ({
  title,
  summary: summarise(document),
  document,
});

/** A form with the defaults of the register, on a beam it is made for. */
function formStart(key: string): Start {
  const form = formByKey(key);
  if (!form) throw new DomainError('notFound', `There is no interaction form \`${key}\`.`);
  const { parameters, label } = presentForm(form);
  const given = startingParameters(parameters);
  const term = { form: key, ...Object.fromEntries(given.map((p) => [p.key, p.default])) };
  const { beam, scale, forward } = beamFor(key, parameters);
  const units = { atom: ATOMS, nucleus: NUCLEI, neutron: NEUTRONS }[scale];
  return begun(label, documentOf(beam, term, { angles: forward ? WHOLE : BACKWARD, units }));
}

/** The Coulomb potential of a nucleus inside its atom. */
function screenedBy(charge: number): InteractionTerm {
  const length = Number(thomasFermiLength(charge).toPrecision(4));
  return { form: 'screenedCoulomb', a: { value: length, unit: 'angstrom' } };
}

/** Alpha particles on an atom: Rutherford scattering, with the screening that keeps its total finite. */
function nuclideStart(name: string, of = ''): Start {
  const { atomicNumber: charge } = nuclide(name);
  const beam: Beam = { ...ALPHA, target: { kind: 'nuclide', nuclide: name } };
  const document = documentOf(beam, screenedBy(charge), { angles: BACKWARD, units: NUCLEI });
  return begun(`Alpha particles on ${name}${of}`, document);
}

/** The element that scatters charged particles most. */
function heaviestOf(formula: string): string {
  const symbols = parseFormula(formula).parts.map(({ symbol }) => symbol);
  return symbols.reduce((most, symbol) =>
    atomicNumber(symbol) > atomicNumber(most) ? symbol : most,
  );
}

/** A label that is no abbreviation begins small inside a sentence. */
function withinSentence(label: string): string {
  return /^[A-Z][a-z]/.test(label) ? label.charAt(0).toLowerCase() + label.slice(1) : label;
}

function materialStart(key: string): Start {
  const { label, formula } = material(key);
  const { parts } = parseFormula(formula);
  const symbol = heaviestOf(formula);
  const named = parts.find((part) => part.symbol === symbol && part.massNumber !== null)?.name;
  const name = named ?? mainIsotope(symbol)?.name;
  if (name === undefined) throw new Error(`${label}: no isotope of ${symbol} occurs in nature.`);
  return nuclideStart(name, `, for ${withinSentence(label)}`);
}

/**
 * Slow neutrons on nuclei that are held in place, by the table's length and incoherent scattering. Where a resonance makes the length
 * hold at one energy only, it is written out, for the engine takes none from the table there.
 */
function neutronStart(name: string, title = `Slow neutrons on ${name}`): Start {
  const { resonant } = neutronEntry(name);
  const { value } = boundLength(name);
  const named = name.includes('-') ? { nuclide: name } : { element: name };
  const term = { form: 'contact', ...(resonant ? { b: { value, unit: 'fm' } } : named) };
  const document = documentOf(SLOW_NEUTRON, term, { angles: WHOLE, units: NEUTRONS });
  return begun(resonant ? `${title}, near a resonance` : title, document);
}

const CARBON = 6;
const GOLD = 79;

/** Leptons on a screened carbon nucleus, neutrons on bound carbon, charged nuclei on gold. */
function speciesStart(key: string): Start {
  const { label, kind, massNumber } = species(key);
  const names = `${label}s`.replace(/^(Muon|Helion)s?( \(.*\))s$/, '$1s$2');
  if (key === 'neutron') return neutronStart('C', 'Slow neutrons on carbon');
  const projectile = { species: key } as Beam['projectile'];
  if (kind !== 'lepton') {
    const beam: Beam = { ...ALPHA, projectile, energy: { value: massNumber ?? 2, unit: 'MeV' } };
    const document = documentOf(beam, screenedBy(GOLD), { angles: BACKWARD, units: NUCLEI });
    return begun(`${names} on Au-197`, document);
  }
  const light = key === 'electron' || key === 'positron';
  const beam: Beam = {
    projectile,
    target: { kind: 'fixed', charge: CARBON },
    energy: light ? { value: 10, unit: 'keV' } : { value: 1, unit: 'MeV' },
  };
  const rest = { angles: WHOLE, units: ATOMS };
  return begun(`${names} on carbon`, documentOf(beam, screenedBy(CARBON), rest));
}

const STARTS: Readonly<Record<StartKind, (name: string) => Start>> = {
  form: formStart,
  nuclide: (name) => nuclideStart(name),
  species: speciesStart,
  neutron: (name) => neutronStart(name),
  material: materialStart,
};

/**
 * A document for a new case with something from the Reference in its place.
 * Throws DomainError('notFound') for an unknown form and 'invalidInput' for anything else the tables do not have, in words.
 */
export function startDocument(kind: StartKind, name: string): Start {
  return STARTS[kind](name);
}
