// @ts-check
import process from 'node:process';

/**
 * One line of progress, in plain words.
 * @param {string} line
 */
export function say(line) {
  process.stdout.write(`${line}\n`);
}

/** A failure that a person can mend: what failed, and what to do about it. */
export class Failure extends Error {
  /**
   * @param {string} what
   * @param {string} mend
   */
  constructor(what, mend) {
    super(what);
    this.name = 'Failure';
    this.mend = mend;
  }
}

/**
 * @param {unknown} error
 * @returns {string}
 */
export function describeFailure(error) {
  if (error instanceof Failure) return `Failed: ${error.message}\nMend:   ${error.mend}`;
  if (error instanceof Error) return `Failed: ${error.stack ?? error.message}`;
  return `Failed: ${String(error)}`;
}

/**
 * @param {unknown} error
 * @returns {string} the code of a system error (`EADDRINUSE`), or an empty string
 */
export function errorCode(error) {
  return error instanceof Error && 'code' in error ? String(error.code) : '';
}
