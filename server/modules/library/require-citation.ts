import type { EntityManager } from '@mikro-orm/postgresql';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { DomainError } from '#shared/errors.ts';
import { canonicalJson } from '#server/documents/canonical-hash.ts';
import { interactionRow } from './interaction-rows.ts';

const PATH = '/interaction/citation';

function refuse(message: string): never {
  throw new DomainError('invalidInput', `${PATH}: ${message}`, {
    errors: [{ path: PATH, message }],
  });
}

/**
 * A document may only cite what it uses: the interaction and its version exist, and the terms are those of that version.
 * Throws DomainError('invalidInput') whose pointer goes into the document.
 */
export async function requireCitation(
  em: EntityManager,
  { interaction }: Pick<CaseDocument, 'interaction'>,
): Promise<void> {
  const { citation, terms } = interaction;
  if (citation === undefined) return;
  const { id, version } = citation;
  const newest = await interactionRow(em, id);
  if (!newest) {
    refuse('The library has no interaction with this identifier; leave the citation out.');
  }
  const { name } = newest.content;
  const cited = version === newest.n ? newest : await interactionRow(em, id, version);
  if (!cited) {
    refuse(
      `“${name}” has no version ${version}, its newest is ${newest.n}; cite one there is, or leave the citation out.`,
    );
  }
  if (canonicalJson(cited.content.terms) !== canonicalJson(terms)) {
    refuse(
      `The terms differ from version ${version} of “${name}”; leave the citation out, or take the version again.`,
    );
  }
}
