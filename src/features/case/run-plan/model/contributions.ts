import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import type { RunPlan, RunPlanBody } from '#shared/contracts/run-plans.ts';
import { same } from '#src/lib/same.ts';
import { estimateBody } from '../../api.ts';
import { without } from '../../model/without.ts';

export type Contribution = NonNullable<RunPlanBody['contributions']>[number];

/** What another element scatters by: a law that needs no more than its name, or the terms of the case as they are. */
export type LawOfElement = 'atom' | 'contact' | 'coulomb' | 'case';

const symbolOf = (name: string): string => name.split('-')[0] ?? name;

/** Atoms of the target that are neither the scatterer nor counted yet. */
export function uncounted({ atoms, scatterer }: RunPlan, plan: RunPlanBody): string[] {
  const counted = [scatterer, ...(plan.contributions ?? []).map((one) => one.scatterer)];
  const done = new Set(counted.map(symbolOf));
  return atoms.map(({ name }) => name).filter((name) => !done.has(symbolOf(name)));
}

/** Laws that hold for the projectile of a case, the likeliest first. */
export function lawsFor({ projectile }: CaseDocument): LawOfElement[] {
  const species = 'species' in projectile ? projectile.species : null;
  if (species === 'neutron') return ['contact', 'case'];
  if (species === 'electron') return ['atom', 'coulomb', 'case'];
  return ['coulomb', 'case'];
}

function termsOf(law: LawOfElement, name: string, document: CaseDocument): InteractionTerm[] {
  if (law === 'atom') return [{ form: 'atomicElectron', element: symbolOf(name) }];
  if (law === 'contact') {
    const key = name.includes('-') ? 'nuclide' : 'element';
    return [{ form: 'contact', [key]: name }];
  }
  if (law === 'coulomb') return [{ form: 'coulomb' }];
  return estimateBody(document).interaction.terms;
}

/** The same beam on another element of the target. */
export function contributionOf(
  document: CaseDocument,
  name: string,
  nuclide: string,
  law: LawOfElement,
): Contribution {
  const body = without(estimateBody(document), 'angles', 'goldenRule', 'identical', 'corrections');
  return {
    scatterer: name,
    estimate: {
      ...body,
      target: { kind: 'nuclide', nuclide },
      interaction: { terms: termsOf(law, name, document) },
    },
  };
}

const BEAM = ['projectile', 'energy', 'kinematics'] as const;

/** True where the beam of the case is no longer the one this element was counted with. */
export const isOutOfDate = (document: CaseDocument, { estimate }: Contribution): boolean =>
  BEAM.some((key) => !same(document[key], estimate[key]));

export function withBeamOf(document: CaseDocument, contribution: Contribution): Contribution {
  const { projectile, energy, kinematics } = document;
  const estimate = {
    ...without(contribution.estimate, 'kinematics'),
    projectile,
    energy,
    ...(kinematics && { kinematics }),
  };
  return { ...contribution, estimate };
}

/** The plan with other contributions; none is no member at all. */
export function withContributions(plan: RunPlanBody, list: readonly Contribution[]): RunPlanBody {
  return list.length === 0 ? without(plan, 'contributions') : { ...plan, contributions: [...list] };
}
