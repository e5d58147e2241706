// @ts-check
import { createHash, createHmac, pbkdf2Sync, randomBytes } from 'node:crypto';

const ITERATIONS = 4096;

/**
 * What PostgreSQL keeps of a password (RFC 5802), so that the password itself is in no statement and no log.
 * @param {string} password ASCII
 * @param {Buffer} [salt]
 * @returns {string}
 */
export function scramVerifier(password, salt = randomBytes(16)) {
  const salted = pbkdf2Sync(password, salt, ITERATIONS, 32, 'sha256');
  const hmac = (/** @type {string} */ word) => createHmac('sha256', salted).update(word).digest();
  const storedKey = createHash('sha256').update(hmac('Client Key')).digest('base64');
  const serverKey = hmac('Server Key').toString('base64');
  return `SCRAM-SHA-256$${ITERATIONS}:${salt.toString('base64')}$${storedKey}:${serverKey}`;
}
