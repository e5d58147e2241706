import { UniqueConstraintViolationException } from '@mikro-orm/core';

/** SQLSTATE classes and system errors that mean the server of the database is away or going away. */
const AWAY =
  /^(08...|57P0[123]|53300|ECONNREFUSED|ECONNRESET|EPIPE|ENOTFOUND|EAI_AGAIN|ETIMEDOUT|EHOSTUNREACH)$/;
/** The last one is what the query builder says of a transaction whose connection died under it. */
const AWAY_WORDS =
  /Connection terminated|Connection ended|Client has encountered a connection error|Timeout acquiring a connection|timeout expired|Transaction query already complete/;

/** True where a fault says that the database cannot be reached, not that a statement is wrong. */
export function isDatabaseAway(fault: unknown): boolean {
  for (let at: unknown = fault, depth = 0; at instanceof Error && depth < 4; depth += 1) {
    if ('code' in at && typeof at.code === 'string' && AWAY.test(at.code)) return true;
    if (AWAY_WORDS.test(at.message)) return true;
    if (at instanceof AggregateError && at.errors.some(isDatabaseAway)) return true;
    at = 'previous' in at ? at.previous : at.cause;
  }
  return false;
}

export function isUniqueViolation(fault: unknown): boolean {
  return fault instanceof UniqueConstraintViolationException;
}
