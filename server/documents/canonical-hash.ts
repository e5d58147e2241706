import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';

/** What the hash of a version covers: the document as saved, the result as shown, and the engine that gave it. */
export interface HashedContent {
  document: unknown;
  result: unknown;
  engine: unknown;
}

/** Canonical JSON of RFC 8785. Throws for what JSON cannot hold: NaN, infinities, nothing at all. */
export function canonicalJson(value: unknown): string {
  const text = canonicalize(value);
  if (text === undefined) throw new TypeError('There is no JSON for this value.');
  return text;
}

/** SHA-256, in lower-case hexadecimal, over the canonical JSON of `{document, result, engine}`; nothing else is covered. */
export function canonicalHash({ document, result, engine }: HashedContent): string {
  return createHash('sha256').update(canonicalJson({ document, result, engine })).digest('hex');
}
