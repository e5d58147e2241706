// @ts-check
import { spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import process from 'node:process';
import { createInterface } from 'node:readline';
import { endProcess } from './identity.mjs';
import { Failure, say } from './say.mjs';
import { Stopped } from './shutdown.mjs';

/**
 * @typedef {{ name: string, uid: number, gid: number }} Account
 * @typedef {import('node:child_process').ChildProcess} ChildProcess
 */

const SETPRIV = ['/usr/bin/setpriv', '/bin/setpriv'].find((path) => existsSync(path));

/**
 * Starts a program in a session of its own, so that Ctrl-C reaches us alone and we stop things in order, and asks
 * the kernel to signal it should we be killed.
 * @param {string} command
 * @param {readonly string[]} args
 * @param {{ account?: Account | undefined, cwd?: string, env?: NodeJS.ProcessEnv,
 *   stdio?: import('node:child_process').StdioOptions, orphanSignal?: string }} options
 * @returns {ChildProcess}
 */
export function launch(command, args, options) {
  const { account, orphanSignal = 'TERM', ...rest } = options;
  if (SETPRIV === undefined) {
    const who = account === undefined ? {} : { uid: account.uid, gid: account.gid };
    return spawn(command, args, { ...rest, ...who, detached: true });
  }
  const who =
    account === undefined
      ? []
      : [`--reuid=${account.uid}`, `--regid=${account.gid}`, '--clear-groups'];
  const tied = ['--pdeathsig', orphanSignal, ...who, '--', command, ...args];
  return spawn(SETPRIV, tied, { ...rest, detached: true });
}

/**
 * @param {ChildProcess} child
 * @returns {Promise<string>} how it ended, in words: `code 1`, `signal SIGKILL`, or why it never ran
 */
export function endOf(child) {
  return new Promise((resolve) => {
    child.once('error', (error) => resolve(error.message));
    child.once('close', (code, signal) =>
      resolve(signal === null ? `code ${code}` : `signal ${signal}`),
    );
  });
}

/**
 * Runs a program to its end; rejects with its last lines when it fails, and stops it when everything is to stop.
 * @param {import('./shutdown.mjs').Shutdown} shutdown
 * @param {string} command
 * @param {readonly string[]} args
 * @param {{ what: string, mend: string, account?: Account | undefined, cwd?: string, env?: NodeJS.ProcessEnv,
 *   input?: string, echo?: boolean, heartbeat?: string, orphanSignal?: string,
 *   stopNotice?: string,   stopWith?: [NodeJS.Signals, number][] }} options
 * @returns {Promise<string>} what it wrote
 */
export async function run(shutdown, command, args, options) {
  shutdown.throwIfRequested();
  const { what, mend, account, cwd, env, input, echo = false, heartbeat } = options;
  const child = launch(command, args, {
    account,
    cwd: cwd ?? process.cwd(),
    env: env ?? process.env,
    orphanSignal: options.orphanSignal ?? 'TERM',
    stdio: [input === undefined ? 'ignore' : 'pipe', 'pipe', 'pipe'],
  });
  const ended = endOf(child);
  const steps = options.stopWith ?? [
    ['SIGTERM', 5_000],
    ['SIGKILL', 5_000],
  ];
  const forget = shutdown.onStop(async () => {
    if (options.stopNotice !== undefined) say(options.stopNotice);
    if (child.pid !== undefined) await endProcess(child.pid, steps, true);
  });
  child.stdin?.end(input);
  /** @type {string[]} */
  const lines = [];
  for (const stream of [child.stdout, child.stderr]) {
    if (stream === null) continue;
    createInterface({ input: stream }).on('line', (line) => {
      lines.push(line);
      if (echo) say(line);
    });
  }
  const began = Date.now();
  const timer = setInterval(() => {
    if (heartbeat !== undefined) {
      say(`  … still ${heartbeat} (${Math.round((Date.now() - began) / 1000)} s)`);
    }
  }, 15_000);
  const end = await ended;
  clearInterval(timer);
  forget();
  if (shutdown.isRequested) throw new Stopped(what);
  if (end !== 'code 0') {
    const tail = echo
      ? ''
      : lines
          .slice(-20)
          .map((line) => `\n  | ${line}`)
          .join('');
    throw new Failure(`${what} (${end})${tail}`, mend);
  }
  return lines.join('\n');
}
