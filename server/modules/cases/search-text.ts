import type { CaseDocument } from '#shared/contracts/cases.ts';
import { summarise } from '#server/documents/summarise.ts';

/** What a search looks through besides names: title, tags, forms as written and the beam line, in lower case. */
export function searchText(title: string, tags: readonly string[], document: CaseDocument): string {
  const { beam, target, interaction, detectors } = summarise(document);
  const forms = document.interaction.terms.map((term) => term.form);
  return [title, ...tags, ...forms, beam, target, interaction, detectors].join('\n').toLowerCase();
}
