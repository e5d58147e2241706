// @ts-check
import { randomBytes } from 'node:crypto';
import { chmodSync, mkdirSync, readFileSync, renameSync, statSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { Failure, errorCode } from './say.mjs';

/** Every secret is made of random bytes, written in letters that need no quoting anywhere. */
const BYTES = {
  databaseAdminPassword: 24,
  databaseOwnerPassword: 24,
  databaseRuntimePassword: 24,
  signingKey: 48,
};

/** @typedef {Record<keyof typeof BYTES, string>} Secrets */

/**
 * @param {string} file
 * @returns {Record<string, unknown>}
 */
function readSecrets(file) {
  try {
    const content = JSON.parse(readFileSync(file, 'utf8'));
    if (typeof content !== 'object' || content === null || Array.isArray(content)) {
      throw new SyntaxError('not an object');
    }
    return content;
  } catch (error) {
    if (errorCode(error) === 'ENOENT') return {};
    throw new Failure(
      `the secrets in ${file} cannot be read (${error instanceof Error ? error.message : String(error)})`,
      'restore the file from a copy, or move it away to have new secrets made (everyone signs in again)',
    );
  }
}

/**
 * Reads the secrets, making those that are missing. Keys of others stay as they are.
 * @param {string} file
 * @returns {{ secrets: Secrets, made: string[] }} the names of those that are new
 */
export function ensureSecrets(file) {
  const found = readSecrets(file);
  /** @type {string[]} */
  const made = [];
  const secrets = /** @type {Secrets} */ ({});
  for (const [name, bytes] of Object.entries(BYTES)) {
    const key = /** @type {keyof typeof BYTES} */ (name);
    const value = found[key];
    if (typeof value === 'string' && value.length >= 16) {
      secrets[key] = value;
      continue;
    }
    secrets[key] = randomBytes(bytes).toString('base64url');
    made.push(key);
  }
  if (made.length > 0) {
    mkdirSync(dirname(file), { recursive: true, mode: 0o700 });
    const draft = `${file}.new`;
    writeFileSync(draft, `${JSON.stringify({ ...found, ...secrets }, null, 2)}\n`, { mode: 0o600 });
    renameSync(draft, file);
  } else if ((statSync(file).mode & 0o077) !== 0) {
    chmodSync(file, 0o600);
  }
  return { secrets, made };
}
