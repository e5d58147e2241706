import type { ErrorRequestHandler } from 'express';
import { DomainError } from '#shared/errors.ts';
import { isDatabaseAway, isUniqueViolation } from '#server/db/faults.ts';
import { logOf, requestIdOf } from './logging.ts';
import { sendProblem } from './problem.ts';

/** Faults of reading the request, as the parsers of bodies and addresses mark them. */
function reading(fault: Error): DomainError | undefined {
  const status = 'status' in fault ? fault.status : undefined;
  if (status === 413) {
    return new DomainError(
      'payloadTooLarge',
      'The body is larger than 1 MB; send less at once. A table of V(r) may have at most 2000 rows.',
    );
  }
  if (status === 415) {
    return new DomainError(
      'unsupportedMediaType',
      'This content or character encoding is unknown.',
    );
  }
  if (status === 403 || status === 404) {
    return new DomainError('notFound', 'There is nothing at this address.');
  }
  if (status === 400 || fault instanceof URIError) {
    return new DomainError('malformed', 'The request or its address cannot be read.');
  }
  return undefined;
}

/** What a fault means to the person who asked; undefined for a bug. */
export function asRefusal(fault: unknown): DomainError | undefined {
  if (fault instanceof DomainError) return fault;
  if (isDatabaseAway(fault)) {
    return new DomainError(
      'unavailable',
      'The database does not answer at the moment. Try again in a few seconds; if you were saving, look first whether it was saved.',
      { extra: { retryAfter: 5 } },
    );
  }
  if (isUniqueViolation(fault)) {
    return new DomainError(
      'conflict',
      'Someone has just made the same entry; reload and try again.',
    );
  }
  return fault instanceof Error ? reading(fault) : undefined;
}

/** The last middleware: refusals become problem documents; a bug is logged whole and answered blandly. */
export const errorEdge: ErrorRequestHandler = (fault: unknown, req, res, next) => {
  const refusal = asRefusal(fault);
  if (!refusal || refusal.code === 'internal') logOf(req).error({ err: fault }, 'unexpected error');
  else if (refusal.code === 'unavailable') logOf(req).warn({ err: fault }, 'not available');
  if (res.headersSent) {
    next(fault);
    return;
  }
  const id = requestIdOf(req);
  sendProblem(
    res,
    refusal ??
      new DomainError('internal', `Something went wrong on our side; it is logged as ${id}.`, {
        extra: { requestId: id },
      }),
  );
};
