import { DomainError } from '#shared/errors.ts';

/** Where a fault of what was computed stands in what was sent. */
export type Place = (path: string) => string;
export const ofEstimate: Place = (path) => `/document${path}`;
/** A run plan is asked for with its estimate inside; in a document it stands beside. */
export const ofRunPlan: Place = (path) =>
  path.startsWith('/estimate') ? `/document${path.slice(9)}` : `/document/runPlan${path}`;

/** A fault of the document, told by its place in what was sent: the document is a member there. */
export function withinDocument(fault: unknown, place: Place = ofEstimate): unknown {
  if (!(fault instanceof DomainError) || fault.code !== 'invalidInput') return fault;
  const given = fault.details.errors ?? [{ path: '', message: fault.message }];
  const errors = given.map(({ path, message }) => ({ path: place(path), message }));
  const [first, ...rest] = errors;
  const more = rest.length > 0 ? ` (and ${rest.length} more)` : '';
  const message = first ? `${first.path}: ${first.message}${more}` : fault.message;
  return new DomainError(fault.code, message, { ...fault.details, errors });
}
