import { DomainError } from '#shared/errors.ts';

const KNOWN = ['lowmoor-demo', 'password1234', 'passwordpassword', 'qwertyuiop12', '123456789012'];
const LEAST_DIFFERENT = 5;

function weakness(password: string, email: string): string | undefined {
  const lower = password.toLowerCase();
  if (KNOWN.includes(lower)) return 'This password is known to everyone; choose another.';
  if (new Set(lower).size < LEAST_DIFFERENT) {
    return `A password needs at least ${LEAST_DIFFERENT} different characters.`;
  }
  const [local = ''] = email.toLowerCase().split('@');
  if (lower.includes(email.toLowerCase()) || (local.length >= 6 && lower.includes(local))) {
    return 'A password may not contain the e-mail address; choose another.';
  }
  return undefined;
}

/** Refuses what is guessed first. Length and bytes are the schema's part. */
export function checkPassword(password: string, email: string, path = '/password'): void {
  const message = weakness(password, email);
  if (message === undefined) return;
  throw new DomainError('invalidInput', message, { errors: [{ path, message }] });
}
