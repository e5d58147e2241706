import { DomainError } from '#shared/errors.ts';

/** If-Match as the OpenAPI document describes it. */
export const IF_MATCH_HEADER = {
  name: 'If-Match',
  required: true,
  description: 'ETag of the case the change starts from, as GET on the case answers it.',
};

/** A case changes with every save and every change of status; each raises its lock, and that is the tag. */
export function etagOf(lock: number): string {
  return `"${lock}"`;
}

/**
 * Whether an If-Match header allows a change of the case (or of what else carries a lock) at this lock. A tag that a proxy weakened (`W/"3"`, as compressing
 * ones do) still names one state of the case exactly, so it is taken.
 * Throws DomainError('preconditionRequired') without a header, DomainError('malformed') for one that is none.
 */
export function matchesLock(header: string | undefined, lock: number, what = 'the case'): boolean {
  const text = header?.trim() ?? '';
  if (text === '') {
    throw new DomainError(
      'preconditionRequired',
      `Send If-Match with the ETag of ${what} you started from, so that nobody’s work is overwritten unseen.`,
    );
  }
  if (text === '*') return true;
  const tags = text.split(',').map((tag) => tag.trim());
  if (!tags.every((tag) => /^(W\/)?"[^"]*"$/.test(tag))) {
    throw new DomainError(
      'malformed',
      `If-Match must be an ETag in quotation marks, such as "3", as GET on ${what} answers it.`,
    );
  }
  return tags.some((tag) => tag.replace(/^W\//, '') === etagOf(lock));
}
