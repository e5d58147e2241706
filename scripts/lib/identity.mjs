// @ts-check
import { readFileSync, readlinkSync } from 'node:fs';
import process from 'node:process';
import { setTimeout as sleep } from 'node:timers/promises';
import { errorCode } from './say.mjs';

/**
 * A process named so that a later process with the same number is not taken for it.
 * @typedef {{ pid: number, startedAt: string, boot: string }} Identity
 */

/**
 * @param {string} path
 * @returns {string} the text, or an empty string where the file cannot be read (no /proc, or gone)
 */
function readOrEmpty(path) {
  try {
    return readFileSync(path, 'utf8');
  } catch (error) {
    if (errorCode(error) === '') throw error;
    return '';
  }
}

/**
 * Fields of /proc/PID/stat after the command, which may itself hold blanks and brackets.
 * @param {number} pid
 * @returns {string[]}
 */
function statFields(pid) {
  const text = readOrEmpty(`/proc/${pid}/stat`);
  return text.slice(text.lastIndexOf(')') + 2).split(' ');
}

/**
 * @param {number} pid
 * @returns {boolean} false for a process that has ended, also when nobody has collected it yet
 */
export function isRunning(pid) {
  try {
    process.kill(pid, 0);
  } catch (error) {
    if (errorCode(error) !== 'EPERM') return false;
  }
  return statFields(pid)[0] !== 'Z';
}

/**
 * @param {number} pid
 * @returns {Identity}
 */
export function identify(pid) {
  return {
    pid,
    startedAt: statFields(pid)[19] ?? '',
    boot: readOrEmpty('/proc/sys/kernel/random/boot_id').trim(),
  };
}

/**
 * @param {Identity} identity
 * @returns {boolean}
 */
export function isSameAndRunning(identity) {
  if (!(Number.isInteger(identity.pid) && identity.pid > 0) || !isRunning(identity.pid)) {
    return false;
  }
  const now = identify(identity.pid);
  return now.startedAt === identity.startedAt && now.boot === identity.boot;
}

/**
 * @param {number} pid
 * @returns {number} the parent's number, 0 when unknown
 */
export function parentOf(pid) {
  return Number(statFields(pid)[1] ?? 0) || 0;
}

/**
 * @param {number} pid
 * @returns {string} name of the program, empty when unknown
 */
export function programOf(pid) {
  return readOrEmpty(`/proc/${pid}/comm`).trim();
}

/**
 * @param {number} pid
 * @returns {string} folder the process works in, empty when unknown
 */
export function workingFolderOf(pid) {
  try {
    return readlinkSync(`/proc/${pid}/cwd`);
  } catch (error) {
    if (errorCode(error) === '') throw error;
    return '';
  }
}

/**
 * Sends the signals in turn, each with its patience, until the process is gone.
 * @param {number} pid
 * @param {[NodeJS.Signals, number][]} steps signal and patience in milliseconds
 * @param {boolean} [group] also everything in the group the process leads
 */
export async function endProcess(pid, steps, group = false) {
  for (const [signal, patience] of steps) {
    try {
      process.kill(group ? -pid : pid, signal);
    } catch (error) {
      if (errorCode(error) !== 'ESRCH') throw error;
    }
    for (let waited = 0; waited < patience; waited += 50) {
      if (!isRunning(pid)) return;
      await sleep(50);
    }
  }
}
