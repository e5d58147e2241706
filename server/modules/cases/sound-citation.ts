import type { EntityManager } from '@mikro-orm/postgresql';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { requireCitation } from '#server/modules/library/require-citation.ts';
import { withinDocument } from './document-faults.ts';

/** A version that says where its interaction is from must have it from there. */
export async function requireSoundCitation(
  em: EntityManager,
  document: CaseDocument,
): Promise<void> {
  await requireCitation(em, document).catch((fault: unknown) => {
    throw withinDocument(fault);
  });
}
