import { CURRENT_FORMAT, caseDocumentSchema } from '#shared/contracts/cases.ts';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { upcast } from './upcast.ts';
import type { StoredDocument, Upcaster } from './upcast.ts';

/**
 * Every step between formats that were ever saved; a step is added with its format and never removed. Format 1 is the first.
 * Whatever tightens caseDocumentSchema is a new format, with a step here that mends the old documents.
 */
export const UPCASTERS: ReadonlyMap<number, Upcaster> = new Map();

/** The document of a version in today's format, whatever format it was saved in. */
export function readDocument(stored: StoredDocument): CaseDocument {
  return caseDocumentSchema.parse(upcast(stored, CURRENT_FORMAT, UPCASTERS));
}
