import type { Example, PublishInteraction } from '#shared/contracts/library.ts';
import type { EstimateRequest } from '#shared/contracts/estimates.ts';
import { isQuantity } from '#shared/contracts/terms.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { DomainError } from '#shared/errors.ts';
import { estimate } from '#server/modules/estimates/estimate.ts';
import { withSlot } from '#server/modules/estimates/in-flight.ts';
import type { ComputeContext } from '#server/modules/cases/compute-content.ts';

const TERMS = '/interaction/terms';

/** Whether lengths are those of nuclei. */
function inFemtometres(terms: readonly InteractionTerm[]): boolean {
  return terms.some((term) =>
    Object.values(term).some((value) =>
      isQuantity(value) ? /\bfm/.test(value.unit) : value === 'fm',
    ),
  );
}

/** A collision to check with where none was given: what the validity names first, on a fixed centre. */
export function exampleFor({ terms, validity }: PublishInteraction): Example {
  const contact = terms.some(({ form }) => form === 'contact');
  const nuclear = inFemtometres(terms);
  const energy = validity.energy?.from ?? validity.energy?.to;
  return {
    projectile: { species: validity.species?.[0] ?? (contact ? 'neutron' : 'electron') },
    target: { kind: 'fixed', charge: 0 },
    energy: energy ?? (nuclear ? { value: 1, unit: 'MeV' } : { value: 1, unit: 'keV' }),
    kinematics: 'nonrelativistic',
    units: nuclear
      ? { length: 'fm', area: 'barn', energy: 'MeV' }
      : { length: 'angstrom', area: 'angstrom2', energy: 'eV' },
  };
}

function withinPublication(fault: unknown, given: boolean): unknown {
  if (!(fault instanceof DomainError) || fault.code !== 'invalidInput') return fault;
  const found = fault.details.errors ?? [{ path: '', message: fault.message }];
  const errors = found.map(({ path, message }) => {
    if (path.startsWith(TERMS)) return { path: `/terms${path.slice(TERMS.length)}`, message };
    return given
      ? { path: `/example${path}`, message }
      : {
          path: '/example',
          message: `Give a collision to check the interaction with: with the one assumed, ${message}`,
        };
  });
  const [first, ...rest] = errors;
  const more = rest.length > 0 ? ` (and ${rest.length} more)` : '';
  const message = first ? `${first.path}: ${first.message}${more}` : fault.message;
  return new DomainError(fault.code, message, { ...fault.details, errors });
}

/**
 * Computes the example with these terms by the one way a case is computed, so that a case with them can be. Faults are told
 * by their place in the publication. Answers the example.
 */
export async function checkTerms(
  input: PublishInteraction,
  context: ComputeContext,
): Promise<Example> {
  const example = input.example ?? exampleFor(input);
  const request: EstimateRequest = {
    ...example,
    interaction: { terms: input.terms },
    methods: ['born1'],
    angles: { unit: 'deg', values: [90] },
  };
  const work = () => estimate(request, context);
  await withSlot(context.actor.id, work).catch((fault: unknown) => {
    throw withinPublication(fault, input.example !== undefined);
  });
  return example;
}
