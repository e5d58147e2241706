import type { Response } from 'express';
import type { Problem } from '#shared/contracts/problem-details.ts';
import type { DomainError, ErrorCode } from '#shared/errors.ts';
import { finiteJson } from './finite-json.ts';

/** Exhaustive by type: a new code cannot be forgotten here. */
export const STATUS_OF: Record<ErrorCode, number> = {
  malformed: 400,
  unauthenticated: 401,
  signInFailed: 401,
  forbidden: 403,
  notFound: 404,
  methodNotAllowed: 405,
  conflict: 409,
  staleVersion: 412,
  payloadTooLarge: 413,
  unsupportedMediaType: 415,
  invalidInput: 422,
  tooMuchWork: 422,
  preconditionRequired: 428,
  tooManyRequests: 429,
  internal: 500,
  unavailable: 503,
};

const TITLE_OF: Record<ErrorCode, string> = {
  malformed: 'The request cannot be read',
  unauthenticated: 'Not signed in',
  signInFailed: 'Sign-in failed',
  forbidden: 'Not allowed',
  notFound: 'Not found',
  methodNotAllowed: 'Method not allowed',
  conflict: 'Conflict',
  staleVersion: 'The version is not the newest',
  payloadTooLarge: 'Too large',
  unsupportedMediaType: 'Unsupported content type',
  invalidInput: 'The input is not valid',
  tooMuchWork: 'Too much work',
  preconditionRequired: 'If-Match is needed',
  tooManyRequests: 'Too many requests',
  internal: 'Internal error',
  unavailable: 'Not available at the moment',
};

export function toProblem(error: DomainError): Problem & Record<string, unknown> {
  return {
    ...error.details.extra,
    type: `urn:tallybarn:problem:${error.code}`,
    title: TITLE_OF[error.code],
    status: STATUS_OF[error.code],
    detail: error.message,
    code: error.code,
    ...(error.details.errors && { errors: error.details.errors }),
  };
}

/** Answers a refusal as RFC 9457 asks. `retryAfter` (seconds) among the extra details becomes the header too. */
export function sendProblem(res: Response, error: DomainError): void {
  const retryAfter = error.details.extra?.['retryAfter'];
  if (typeof retryAfter === 'number') res.setHeader('Retry-After', String(Math.ceil(retryAfter)));
  if (error.code === 'unauthenticated') res.setHeader('WWW-Authenticate', 'Bearer');
  res
    .status(STATUS_OF[error.code])
    .setHeader('Content-Type', 'application/problem+json; charset=utf-8')
    .end(finiteJson(toProblem(error)));
}
