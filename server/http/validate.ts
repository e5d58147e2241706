import type { z } from 'zod';
import { DomainError } from '#shared/errors.ts';
import type { FieldError } from '#shared/errors.ts';
import { fieldErrors } from './field-errors.ts';
import { issueMessages } from './issue-messages.ts';
import { unsafeValues } from './unsafe-values.ts';

function refuse(errors: FieldError[]): never {
  const first = errors[0];
  const rest = errors.length > 1 ? ` (and ${errors.length - 1} more)` : '';
  const where = first && first.path !== '' ? `${first.path}: ` : '';
  throw new DomainError('invalidInput', `${where}${first?.message ?? 'Invalid.'}${rest}`, {
    errors,
  });
}

/** The parsed value, or a refusal (422) whose paths are JSON Pointers into what was sent. */
export function validate<S extends z.ZodType>(schema: S, value: unknown): z.output<S> {
  const unsafe = unsafeValues(value);
  if (unsafe.length > 0) refuse(unsafe);
  const result = schema.safeParse(value, { reportInput: true, error: issueMessages });
  if (!result.success) refuse(fieldErrors(result.error.issues));
  return result.data;
}
