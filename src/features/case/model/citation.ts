import type { CaseDocument } from '#shared/contracts/cases.ts';
import type { Citation } from '#shared/contracts/estimates.ts';
import type { Example, InteractionVersion, ValidityRange } from '#shared/contracts/library.ts';
import { toInternal } from '#shared/units/quantity.ts';
import { energyRangeText, speciesText } from '#src/lib/interaction-words.ts';
import { same } from '#src/lib/same.ts';
import { projectileText, quantityText } from '#src/lib/term-words.ts';
import { DEFAULT_DOCUMENT } from './default-document.ts';
import type { Draft } from './editor.ts';
import { isAtOrBelow, withoutEntered } from './entered.ts';

const TERMS = '/interaction/terms';

export function citationOf({ id, version }: Pick<InteractionVersion, 'id' | 'version'>): Citation {
  return { id, version: version.n };
}

/** The interaction of the draft replaced by a version of the library, which it then cites. */
export function takeInteraction(draft: Draft, taken: InteractionVersion): Draft {
  const open = Object.entries(draft.open).filter(([pointer]) => !isAtOrBelow(pointer, TERMS));
  const document = {
    ...withoutEntered(draft.document, TERMS),
    interaction: { terms: taken.terms, citation: citationOf(taken) },
  };
  return { ...draft, document, open: Object.fromEntries(open) };
}

/** Says where the terms are from, if they still are what was published. */
export function cite(document: CaseDocument, published: InteractionVersion): CaseDocument {
  const { terms } = document.interaction;
  if (!same(terms, published.terms)) return document;
  return { ...document, interaction: { terms, citation: citationOf(published) } };
}

export function withoutCitation(document: CaseDocument): CaseDocument {
  return { ...document, interaction: { terms: document.interaction.terms } };
}

/** A new case with this interaction in it, in the collision it was published with. */
export function documentWith(taken: InteractionVersion): CaseDocument {
  const { projectile, target, energy, kinematics, units } = taken.example;
  return {
    ...DEFAULT_DOCUMENT,
    projectile,
    target,
    energy,
    kinematics: kinematics ?? 'nonrelativistic',
    interaction: { terms: taken.terms, citation: citationOf(taken) },
    // The box of the default belongs to atoms; left out, the engine chooses one that fits.
    goldenRule: { theta: 60 },
    ...(units && { units }),
  };
}

/** Where the beam of a case lies outside what a version says it is meant for, in words; empty where it does not. */
export function outsideValidity(
  { projectile, energy }: Pick<CaseDocument, 'projectile' | 'energy'>,
  validity: ValidityRange,
): string[] {
  const { species } = validity;
  const { from, to } = validity.energy ?? {};
  const meant: readonly string[] = species ?? [];
  const own = 'species' in projectile ? projectile.species : projectile.nuclide;
  const at = toInternal(energy, 'energy');
  const low = from !== undefined && at < toInternal(from, 'energy');
  const high = to !== undefined && at > toInternal(to, 'energy');
  return [
    ...(species !== undefined && !meant.includes(own)
      ? [`It is meant for ${speciesText(validity)}; this beam is ${projectileText(projectile)}.`]
      : []),
    ...(low || high
      ? [`It is meant for ${energyRangeText(validity)}; this beam has ${quantityText(energy)}.`]
      : []),
  ];
}

/** The collision of a case, to be kept with what is published from it. */
export function exampleOf(document: CaseDocument): Example {
  const { projectile, target, energy, kinematics, units } = document;
  return {
    projectile,
    target,
    energy,
    ...(kinematics && { kinematics }),
    ...(units && { units }),
  };
}
