import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Species } from '#shared/contracts/estimates.ts';
import { isPoints, isQuantity } from '#shared/contracts/terms.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { without } from '../../model/without.ts';

/** The same case with what it scatters from turned round, or why there is none. */
export type Opposite =
  { document: CaseDocument; what: string; antiparticle: Species | null } | { none: string };

const PARTNERS: Partial<Record<Species, Species>> = {
  electron: 'positron',
  positron: 'electron',
  'muon-': 'muon+',
  'muon+': 'muon-',
};

const PLURALS: Partial<Record<Species, string>> = {
  electron: 'electrons',
  positron: 'positrons',
  'muon-': 'negative muons',
  'muon+': 'positive muons',
};

/** Forms whose sign comes from the charge of the projectile; a charge product in the term comes before it. */
const BY_CHARGE = ['coulomb', 'screenedCoulomb', 'extendedCharge', 'moliere', 'atomicElectron'];
/** The strength of each form: a real number that may have either sign. */
const STRENGTHS: Readonly<Record<string, string>> = {
  yukawa: 'V0',
  squareWell: 'V0',
  gaussian: 'V0',
  exponential: 'V0',
  woodsSaxon: 'V0',
  hulthen: 'V0',
  deltaShell: 'g',
  spinOrbit: 'Vso',
  contact: 'b',
};

/** A term with its real part turned round; what absorbs stays, for no potential creates particles. Null where no opposite can be written. */
function reversed(term: InteractionTerm): InteractionTerm | null {
  const { form } = term;
  const key = STRENGTHS[form] ?? (term['chargeProduct'] === undefined ? '' : 'chargeProduct');
  const strength = term[key];
  if (typeof strength === 'number') return { ...term, [key]: -strength };
  if (strength !== undefined && isQuantity(strength)) {
    return { ...term, [key]: { ...strength, value: -strength.value } };
  }
  if (form === 'tabulated') {
    const { points } = term;
    if (points === undefined || !isPoints(points)) return null;
    return { ...term, form, points: points.map(([r, v]): [number, number] => [r, -v]) };
  }
  const { formula } = term;
  if (form === 'expression' && typeof formula === 'string') {
    return { ...term, formula: `-(${formula})` };
  }
  return null;
}

const bare = (document: CaseDocument) => without(document, 'entered');

/** Leptons on charges: the antiparticle feels the opposite charge, and whatever does not hang on charge stays as it is. */
function antiparticleCase(document: CaseDocument, species: Species, partner: Species): Opposite {
  const terms = document.interaction.terms.map((term): InteractionTerm =>
    term['chargeProduct'] === undefined ? term : (reversed(term) ?? term),
  );
  return {
    document: {
      ...bare(document),
      projectile: { species: partner },
      interaction: { terms },
    },
    what: `${PLURALS[partner] ?? partner} in place of ${PLURALS[species] ?? species}`,
    antiparticle: partner,
  };
}

export function oppositeOf(document: CaseDocument): Opposite {
  const { projectile, target } = document;
  const { terms } = document.interaction;
  const species = 'species' in projectile ? projectile.species : 'custom';
  const partner = species === 'custom' ? undefined : PARTNERS[species];
  const charged = terms.filter(({ form }) => BY_CHARGE.includes(form));
  if (partner !== undefined && species !== 'custom' && charged.length > 0) {
    return antiparticleCase(document, species, partner);
  }
  // A fixed centre can be given the opposite charge.
  const flips = target.kind === 'fixed' && target.charge !== 0;
  const changed = terms.map((term) => {
    const byCentre = ['coulomb', 'screenedCoulomb', 'extendedCharge'].includes(term.form);
    if (byCentre && term['chargeProduct'] === undefined) return flips ? term : null;
    return reversed(term);
  });
  const held = changed.findIndex((term) => term === null);
  const missing = terms[held];
  if (missing) return { none: reasonFor(missing.form) };
  return {
    document: {
      ...bare(document),
      ...(flips && target.kind === 'fixed'
        ? { target: { ...target, charge: -target.charge } }
        : {}),
      interaction: { terms: changed.filter((term) => term !== null) },
    },
    what: 'every real strength with the opposite sign; absorption as it is',
    antiparticle: null,
  };
}

function reasonFor(form: string): string {
  switch (form) {
    case 'hardSphere':
      return 'An impenetrable sphere has no opposite.';
    case 'polarization':
      return 'The polarization potential attracts either charge: it has no opposite.';
    case 'krc':
    case 'universalIon':
      return 'The repulsion of two atoms has no opposite.';
    case 'contact':
      return 'The length comes from the table; give it as a number to compare both signs.';
    default:
      return 'The charges are those of projectile and target and cannot be turned round; write their product into the term to compare both signs.';
  }
}
