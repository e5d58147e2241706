import type { EstimateResult } from './estimate.ts';
import { SLOW_NEUTRON_LIMIT } from './observables/neutron-sample.ts';
import { LENGTH_FROM_TABLE } from './potentials/contact-by-name.ts';
import type { Term } from './potentials/types.ts';
import type { Warning } from './warning.ts';

const BARN_PER_ANGSTROM2 = 1e8;
const SAME_CHARGE = 1e-6;

const hasTableLength = ({ cautions = [] }: Term) =>
  cautions.some(({ code }) => code === LENGTH_FROM_TABLE);

/** Forms that carry their own charges, and their share in Z1 Z2 of the beam and target they are made for. */
const MADE_FOR_ATOMS = ['krc', 'universalIon', 'atomicElectron'];

/** An atom in the term that is not the one in the target, or a pair of ions under another beam. */
export function chargesDiffer({ problem }: EstimateResult): Warning | null {
  const { projectile, target, terms } = problem;
  const i = terms.findIndex((term) => MADE_FOR_ATOMS.includes(term.form));
  const { form, chargeProduct } = terms[i] ?? {};
  if (form === undefined || chargeProduct === undefined) return null;
  // A custom ion may have lost only some of its electrons.
  if (projectile.kind === 'custom' || target.kind === 'custom') return null;
  if (projectile.charge !== 0 && target.charge === 0) return null;
  const product = projectile.charge * target.charge;
  if (Math.abs(chargeProduct - product) < SAME_CHARGE) return null;
  return {
    code: 'chargesDiffer',
    level: 'caution',
    message: `The ${form} term has Z1 Z2 = ${Number(chargeProduct.toPrecision(6))}, ${projectile.label} and ${target.label} have ${product}: the term wins. Give it the atoms of beam and target, or take a form made for them.`,
    path: `/interaction/terms/${i}`,
  };
}

/** Lengths of the table are those of slow neutrons. */
export function fastNeutron({ problem }: EstimateResult): Warning | null {
  const { terms, energy } = problem;
  const i = terms.findIndex(hasTableLength);
  if (i < 0 || energy <= SLOW_NEUTRON_LIMIT) return null;
  return {
    code: 'lengthForSlowNeutrons',
    level: 'caution',
    message: `The scattering length is that of slow neutrons, below about ${SLOW_NEUTRON_LIMIT} eV. At this energy resonances and higher waves can make the cross section anything else, and the verdict, which takes the length for constant, does not see them.`,
    path: `/interaction/terms/${i}`,
  };
}

/** A length typed by hand for a target that recoils. */
export function boundLength({ problem }: EstimateResult): Warning | null {
  const { terms, target, projectile } = problem;
  const typed = terms.some((term) => term.form === 'contact' && !hasTableLength(term));
  if (!typed || target.mass === Infinity) return null;
  const factor = target.mass / (projectile.mass + target.mass);
  return {
    code: 'freeLength',
    level: 'info',
    message: `The target recoils, so b is taken as the free scattering length. Tables list bound ones: multiply those by ${factor.toPrecision(6)}.`,
    path: '/interaction/terms',
  };
}

/** What the terms say of themselves, each once. */
export function ofTerms({ problem }: EstimateResult): Warning[] {
  const said = new Set<string>();
  return problem.terms.flatMap(({ cautions = [] }, i) =>
    cautions.flatMap(({ code, message, level = 'caution' }) => {
      if (said.has(message)) return [];
      said.add(message);
      return [{ code, message, level, path: `/interaction/terms/${i}` }];
    }),
  );
}

/** What the curve holds beside the square of the amplitude. */
export function incoherentAdded({ problem }: EstimateResult): Warning | null {
  const incoherent = problem.terms.reduce((sum, term) => sum + (term.incoherent ?? 0), 0);
  if (!(incoherent > 0)) return null;
  const barn = 4 * Math.PI * incoherent * BARN_PER_ANGSTROM2;
  return {
    code: 'incoherentAdded',
    level: 'info',
    message: `dσ/dΩ and every integral contain the incoherent scattering of the target, ${barn.toPrecision(4)} barn in all directions alike; the amplitude and the golden-rule sheet do not.`,
    path: '/interaction/terms',
  };
}
