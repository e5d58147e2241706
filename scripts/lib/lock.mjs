// @ts-check
import { randomBytes } from 'node:crypto';
import { linkSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import process from 'node:process';
import { setTimeout as sleep } from 'node:timers/promises';
import { identify, isSameAndRunning } from './identity.mjs';
import { errorCode } from './say.mjs';

/** @typedef {import('./identity.mjs').Identity} Identity */

/** Two that find the same dead holder both replace its file; this long after, the file names the one that won. */
const SETTLE = 150;

/**
 * @param {string} path
 * @returns {Identity | undefined} the living process that holds the lock
 */
export function holderOf(path) {
  try {
    /** @type {Identity} */
    const holder = JSON.parse(readFileSync(path, 'utf8'));
    return isSameAndRunning(holder) ? holder : undefined;
  } catch (error) {
    if (errorCode(error) === 'ENOENT' || error instanceof SyntaxError) return undefined;
    throw error;
  }
}

/**
 * Takes the lock for this process. The file of a holder that was killed is replaced.
 * @param {string} path
 * @returns {Promise<{ release: () => void } | { holder: Identity }>}
 */
export async function takeLock(path) {
  const mine = JSON.stringify({ ...identify(process.pid), token: randomBytes(8).toString('hex') });
  const draft = `${path}.${process.pid}.${randomBytes(4).toString('hex')}`;
  writeFileSync(draft, mine, { mode: 0o600 });
  try {
    linkSync(draft, path);
    rmSync(draft);
  } catch (error) {
    if (errorCode(error) !== 'EEXIST') throw error;
    const holder = holderOf(path);
    if (holder !== undefined) {
      rmSync(draft);
      return { holder };
    }
    renameSync(draft, path);
    await sleep(SETTLE);
  }
  if (readFileSync(path, 'utf8') !== mine) {
    const holder = holderOf(path);
    return holder === undefined ? takeLock(path) : { holder };
  }
  return {
    release() {
      if (readOrNothing(path) === mine) rmSync(path, { force: true });
    },
  };
}

/**
 * @param {string} path
 * @returns {string}
 */
function readOrNothing(path) {
  try {
    return readFileSync(path, 'utf8');
  } catch (error) {
    if (errorCode(error) !== 'ENOENT') throw error;
    return '';
  }
}

/**
 * Waits for its turn, works, and lets go.
 * @template T
 * @param {string} path
 * @param {import('./shutdown.mjs').Shutdown} shutdown
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function withLock(path, shutdown, work) {
  for (;;) {
    shutdown.throwIfRequested();
    const lock = await takeLock(path);
    if ('release' in lock) {
      const forget = shutdown.onStop(async () => lock.release());
      try {
        return await work();
      } finally {
        forget();
        lock.release();
      }
    }
    await sleep(300);
  }
}
