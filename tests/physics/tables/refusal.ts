import { DomainError } from '#shared/errors.ts';

/** The words of a refusal of bad input; fails where nothing is refused, and lets any other exception through. */
export function refusal(action: () => unknown): string {
  try {
    action();
  } catch (error) {
    if (error instanceof DomainError && error.code === 'invalidInput') return error.message;
    throw error;
  }
  throw new Error('Nothing was refused.');
}
