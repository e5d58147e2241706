// @ts-check
import { rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { setTimeout as sleep } from 'node:timers/promises';
import { endProcess, identify } from './identity.mjs';
import { endOf, launch } from './processes.mjs';
import { say } from './say.mjs';
import { ROOT } from './settings.mjs';

/** @typedef {import('./shutdown.mjs').Shutdown} Shutdown */

/** @type {[NodeJS.Signals, number][]} */
const STEPS = [
  ['SIGTERM', 5_000],
  ['SIGKILL', 5_000],
];
/** Deaths within so many milliseconds make the pause before the next start longer. */
const MEMORY = 300_000;
const LONGEST_PAUSE = 60;

/** @param {string} dataDir */
const recordOf = (dataDir) => join(dataDir, 'worker.json');

/**
 * @param {Shutdown} shutdown
 * @param {string} dataDir
 * @param {NodeJS.ProcessEnv} env
 * @returns {Promise<string>} how it ended
 */
function startWorker(shutdown, dataDir, env) {
  const program = ['--enable-source-maps', join(ROOT, 'dist/server/worker.js')];
  // It ends when its stdin closes, so it cannot outlive us however we end.
  const child = launch(process.execPath, program, { env, stdio: ['pipe', 'inherit', 'inherit'] });
  child.stdin?.on('error', () => undefined); // it has ended, which `ended` tells
  const ended = endOf(child);
  const pid = child.pid;
  if (pid !== undefined) {
    writeFileSync(recordOf(dataDir), JSON.stringify(identify(pid)), { mode: 0o600 });
  }
  const forget = shutdown.onStop(async () => {
    if (pid !== undefined) await endProcess(pid, STEPS, true);
    rmSync(recordOf(dataDir), { force: true });
  });
  void ended.then(forget);
  return ended;
}

/**
 * Starts a worker and starts it again whenever it ends, after a pause that grows with its deaths. Nothing else stops for want
 * of it: what it held is computed later, and the pages say that no worker is running.
 * @param {Shutdown} shutdown
 * @param {{ dataDir: string }} settings
 * @param {NodeJS.ProcessEnv} env
 */
export function keepWorker(shutdown, { dataDir }, env) {
  /** @type {number[]} */
  let deaths = [];
  const keep = async () => {
    for (;;) {
      const how = await startWorker(shutdown, dataDir, env);
      if (shutdown.isRequested) return;
      deaths = [...deaths.filter((time) => Date.now() - time < MEMORY), Date.now()];
      const pause = Math.min(LONGEST_PAUSE, 0.5 * 2 ** (deaths.length - 1));
      say(
        `The worker ended unexpectedly (${how}); starting it again in ${pause} s. Jobs keep what they have and go on then.`,
      );
      await Promise.race([sleep(pause * 1000, undefined, { ref: false }), shutdown.requested]);
      if (shutdown.isRequested) return;
    }
  };
  keep().catch((error) => shutdown.fail(error));
}
