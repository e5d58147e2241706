// @ts-check
import { readFileSync } from 'node:fs';
import process from 'node:process';
import { parentOf, programOf } from './identity.mjs';
import { describeFailure, errorCode, say } from './say.mjs';

/**
 * What was started and how to stop it, newest first.
 * @typedef {ReturnType<typeof createShutdown>} Shutdown
 */

/** Thrown where work was given up because everything is to stop. */
export class Stopped extends Error {}

export function createShutdown() {
  const controller = new AbortController();
  /** @type {(() => Promise<void>)[]} */
  const stops = [];
  let stopping = Promise.resolve();
  /** @type {Promise<string>} */
  const requested = new Promise((resolve) => {
    controller.signal.addEventListener('abort', () => resolve(String(controller.signal.reason)));
  });

  async function stopEverything() {
    controller.abort('stop');
    for (let stop = stops.pop(); stop !== undefined; stop = stops.pop()) {
      await stop().catch((error) => say(describeFailure(error)));
    }
  }

  return {
    requested,
    get isRequested() {
      return controller.signal.aborted;
    },
    /** @param {string} reason why, in words */
    request(reason) {
      controller.abort(reason);
    },
    /** @param {unknown} error what went wrong while nobody was waiting for it */
    fail(error) {
      process.exitCode = 1;
      process.stderr.write(`${describeFailure(error)}\n`);
      controller.abort('something failed');
    },
    throwIfRequested() {
      if (controller.signal.aborted) throw new Stopped(String(controller.signal.reason));
    },
    /**
     * @param {() => Promise<void>} stop
     * @returns {() => void} forgets it again
     */
    onStop(stop) {
      stops.push(stop);
      return () => {
        const index = stops.indexOf(stop);
        if (index >= 0) stops.splice(index, 1);
      };
    },
    /** May be called again: what was started meanwhile is stopped as well. */
    stopAll() {
      stopping = stopping.then(stopEverything);
      return stopping;
    },
  };
}

/**
 * @param {number} number of the signal
 * @returns {boolean} whether whoever started us asked to ignore it (nohup)
 */
function isIgnoredFromBirth(number) {
  try {
    const mask = /SigIgn:\s*([0-9a-f]+)/.exec(readFileSync('/proc/self/status', 'utf8'))?.[1];
    return mask !== undefined && ((BigInt(`0x${mask}`) >> BigInt(number - 1)) & 1n) === 1n;
  } catch (error) {
    if (errorCode(error) === '') throw error;
    return false;
  }
}

/** @param {Shutdown} shutdown */
export function watchSignals(shutdown) {
  process.on('SIGINT', () => shutdown.request('interrupted'));
  process.on('SIGTERM', () => shutdown.request('asked to stop'));
  if (!isIgnoredFromBirth(1)) process.on('SIGHUP', () => shutdown.request('the terminal closed'));
  // A reader that went away (`npm start | head`) must not keep us from stopping what we started.
  for (const stream of [process.stdout, process.stderr]) {
    stream.on('error', () => shutdown.request('nobody reads the output any more'));
  }
}

/**
 * npm does not forward SIGTERM: it dies and leaves us behind. So we look whether our parent, or the npm behind
 * the shell it used, is still the one that started us.
 * @param {Shutdown} shutdown
 */
export function watchParent(shutdown) {
  const parent = process.ppid;
  const viaShell =
    process.env['npm_lifecycle_event'] !== undefined && /sh$/.test(programOf(parent));
  const grandparent = viaShell ? parentOf(parent) : 0;
  const timer = setInterval(() => {
    if (process.ppid !== parent || (viaShell && parentOf(parent) !== grandparent)) {
      shutdown.request('the process that started this one is gone');
    }
  }, 500);
  timer.unref();
}

/**
 * The whole life of a script: work, then stop what it started, then leave with a code.
 * @param {(shutdown: Shutdown) => Promise<number>} work answers the exit code
 */
export async function live(work) {
  const shutdown = createShutdown();
  watchSignals(shutdown);
  watchParent(shutdown);
  process.on('uncaughtException', (error) => shutdown.fail(error));
  void shutdown.requested.then(() => shutdown.stopAll());
  let code = 1;
  try {
    code = await work(shutdown);
  } catch (error) {
    if (shutdown.isRequested) {
      await shutdown.stopAll();
      say(`Stopped before the end: ${await shutdown.requested}.`);
      code = 130;
    } else {
      process.stderr.write(`${describeFailure(error)}\n`);
    }
  }
  await shutdown.stopAll();
  process.exit(process.exitCode === 1 ? 1 : code);
}
