// @ts-check
import { randomBytes } from 'node:crypto';
import { chmodSync, mkdirSync, readFileSync, renameSync, statSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import process from 'node:process';
import { Failure, errorCode } from './say.mjs';

/** Every secret is made of random bytes, written in letters that need no quoting anywhere. */
const BYTES = {
  databaseAdminPassword: 24,
  databaseOwnerPassword: 24,
  databaseRuntimePassword: 24,
  signingKey: 48,
};

/**
 * @typedef {keyof typeof BYTES} SecretName
 * @typedef {Record<SecretName, string>} Secrets
 */

const ALL = /** @type {SecretName[]} */ (Object.keys(BYTES));

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
 * @template {SecretName} [Name=SecretName]
 * @param {string} file
 * @param {readonly Name[]} [names] those that are needed
 * @returns {{ secrets: Record<Name, string>, made: Name[] }} `made` names those that are new
 */
export function ensureSecrets(file, names = /** @type {Name[]} */ (ALL)) {
  const found = readSecrets(file);
  /** @type {Name[]} */
  const made = [];
  const secrets = /** @type {Record<Name, string>} */ ({});
  for (const name of names) {
    const value = found[name];
    if (typeof value === 'string' && value.length >= 16) {
      secrets[name] = value;
      continue;
    }
    secrets[name] = randomBytes(BYTES[name]).toString('base64url');
    made.push(name);
  }
  if (made.length > 0) {
    mkdirSync(dirname(file), { recursive: true, mode: 0o700 });
    const draft = `${file}.new`;
    writeFileSync(draft, `${JSON.stringify({ ...found, ...secrets }, null, 2)}\n`, { mode: 0o600 });
    renameSync(draft, file);
    return { secrets, made };
  }
  const { mode, uid } = statSync(file);
  if ((mode & 0o077) !== 0 && uid === process.getuid?.()) chmodSync(file, 0o600);
  return { secrets, made };
}
