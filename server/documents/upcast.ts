import { DomainError } from '#shared/errors.ts';

/** A document as it lies in the database, of whatever format. */
export type StoredDocument = Record<string, unknown>;

/** Turns a document of format k into one of format k + 1. It must keep what the document means and everything a person typed. */
export type Upcaster = (document: StoredDocument) => StoredDocument;

/** Format of a stored document; format 1 may be left out when saving. Undefined when it is no format at all. */
export function formatOf(document: StoredDocument): number | undefined {
  const format = document.format ?? 1;
  return typeof format === 'number' && Number.isInteger(format) && format >= 1 ? format : undefined;
}

/**
 * Brings a document from its own format to `current`, one step at a time. `upcasters` holds under k the step from k to k + 1.
 * Throws DomainError('unavailable') for a format newer than this program, Error for a hole in the chain.
 */
export function upcast(
  stored: StoredDocument,
  current: number,
  upcasters: ReadonlyMap<number, Upcaster>,
): StoredDocument {
  const format = formatOf(stored);
  if (format === undefined) {
    throw new Error(`A stored document carries the format ${JSON.stringify(stored.format)}.`);
  }
  if (format > current) {
    throw new DomainError(
      'unavailable',
      `This case was saved by a newer Tallybarn (document format ${format}; this one reads up to format ${current}). Nothing is wrong with the case: start the newer version to read it.`,
    );
  }
  let document = stored;
  for (let k = format; k < current; k += 1) {
    const step = upcasters.get(k);
    if (!step) throw new Error(`No upcaster from document format ${k} to ${k + 1}.`);
    document = { ...step(document), format: k + 1 };
  }
  return document;
}
