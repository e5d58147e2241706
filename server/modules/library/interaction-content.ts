import { createHash } from 'node:crypto';
import type { Example, InteractionContent, PublishInteraction } from '#shared/contracts/library.ts';
import type { InteractionTerm } from '#shared/contracts/terms.ts';
import { canonicalJson } from '#server/documents/canonical-hash.ts';
import { describeTerm } from '#server/documents/describe-interaction.ts';

/** What a version keeps, in place of what was sent. */
export function contentOf(
  { name, description, validity, source, terms, tags }: PublishInteraction,
  example: Example,
): InteractionContent {
  return { name, description, validity, source, terms, tags, example };
}

/** SHA-256 over the canonical JSON of a content. */
export function contentHash(content: InteractionContent): string {
  return createHash('sha256').update(canonicalJson(content)).digest('hex');
}

export function describeTerms(terms: readonly InteractionTerm[]): string {
  return terms.map((term, index) => describeTerm(term, index, {})).join(' + ');
}

/** What a search looks through besides names of people, in lower case. */
export function interactionSearchText(content: InteractionContent): string {
  const { name, description, validity, source, terms, tags } = content;
  const forms = terms.map(({ form }) => form);
  const species = validity.species ?? [];
  return [
    ...[name, ...tags, description, validity.words, source],
    ...[...forms, ...species, describeTerms(terms)],
  ]
    .join('\n')
    .toLowerCase();
}
