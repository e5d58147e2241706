import { DomainError } from '#shared/errors.ts';
import { ConfigError } from '#server/config.ts';
import { createLogger } from '#server/http/logging.ts';

/** A refusal of a command, in words for whoever typed it. */
export class CommandError extends Error {
  override readonly name = 'CommandError';
}

function wordsOf(fault: unknown): string | undefined {
  if (fault instanceof DomainError) {
    const errors = fault.details.errors ?? [];
    return errors.length > 0 ? errors.map(({ message }) => message).join('\n') : fault.message;
  }
  return fault instanceof CommandError || fault instanceof ConfigError ? fault.message : undefined;
}

/** Runs a command to its end: a refusal is said in words, a bug is logged whole, both end with status 1. */
export async function runCommand(work: () => Promise<void>): Promise<void> {
  try {
    await work();
  } catch (fault) {
    const words = wordsOf(fault);
    if (words !== undefined) process.stderr.write(`${words}\n`);
    else createLogger('error').error({ err: fault }, 'the command failed');
    process.exitCode = 1;
  }
}
