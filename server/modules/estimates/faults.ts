import { DomainError } from '#shared/errors.ts';
import type { FieldError } from '#shared/errors.ts';

/** Faults of an input gathered on the way through it, so that a person hears of all of them at once. */
export class Faults {
  readonly errors: FieldError[] = [];

  add(path: string, message: string): void {
    this.errors.push({ path, message });
  }

  /** Runs `work`; a refusal of the input becomes a fault at `path`, with the pointers it carries below it. */
  within<T>(path: string, work: () => T): T | undefined {
    try {
      return work();
    } catch (error) {
      if (!(error instanceof DomainError) || error.code !== 'invalidInput') throw error;
      const inner = error.details.errors ?? [{ path: '', message: error.message }];
      inner.forEach((fault) => this.add(`${path}${fault.path}`, fault.message));
      return undefined;
    }
  }

  /** Throws DomainError('invalidInput') if anything was found. */
  throwIfAny(): void {
    const [first, ...rest] = this.errors;
    if (!first) return;
    const more = rest.length > 0 ? ` (and ${rest.length} more)` : '';
    throw new DomainError('invalidInput', `${first.path}: ${first.message}${more}`, {
      errors: this.errors,
    });
  }
}
