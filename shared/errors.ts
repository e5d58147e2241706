/** The closed set of error codes a client may switch on. Grows by addition only. */
export const ERROR_CODES = [
  'malformed',
  'invalidInput',
  'unauthenticated',
  'signInFailed',
  'forbidden',
  'notFound',
  'methodNotAllowed',
  'conflict',
  'staleVersion',
  'preconditionRequired',
  'payloadTooLarge',
  'unsupportedMediaType',
  'tooManyRequests',
  'tooMuchWork',
  'unavailable',
  'internal',
] as const;
export type ErrorCode = (typeof ERROR_CODES)[number];

/** One fault of an input: a JSON Pointer into what was sent, and what is wrong with the mend. */
export interface FieldError {
  path: string;
  message: string;
}

/** A refusal in words that a person can act upon; every other exception is a bug. */
export class DomainError extends Error {
  override readonly name = 'DomainError';
  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly details: { errors?: FieldError[]; extra?: Record<string, unknown> } = {},
  ) {
    super(message);
  }
}
