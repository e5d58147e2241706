// @ts-check
import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { get } from 'node:http';
import { join } from 'node:path';
import process from 'node:process';
import { setTimeout as sleep } from 'node:timers/promises';
import { endProcess, identify, isSameAndRunning } from './identity.mjs';
import { endOf, launch } from './processes.mjs';
import { Failure, say } from './say.mjs';
import { hostInUrl } from './settings.mjs';

/**
 * @typedef {import('./shutdown.mjs').Shutdown} Shutdown
 * @typedef {{ host: string, port: number, dataDir: string }} Address
 */

/** @param {string} dataDir */
const recordOf = (dataDir) => join(dataDir, 'server.json');

/** @type {[NodeJS.Signals, number][]} */
const STEPS = [
  ['SIGTERM', 10_000],
  ['SIGKILL', 5_000],
];

/**
 * Stops the server that an earlier start on this DATA_DIR left behind when it was killed.
 * @param {string} dataDir
 */
export async function stopLeftoverServer(dataDir) {
  const record = recordOf(dataDir);
  if (!existsSync(record)) return;
  /** @type {import('./identity.mjs').Identity} */
  let identity;
  try {
    identity = JSON.parse(readFileSync(record, 'utf8'));
  } catch (error) {
    if (!(error instanceof SyntaxError)) throw error;
    return rmSync(record);
  }
  if (isSameAndRunning(identity)) {
    say(`Stopping a server that an earlier start left behind (process ${identity.pid}) …`);
    await endProcess(identity.pid, STEPS, true);
  }
  rmSync(record, { force: true });
}

/**
 * @param {string} host
 * @param {number} port
 * @returns {Promise<boolean>} whether the application says it is well
 */
export function isHealthy(host, port) {
  const reachable = host === '0.0.0.0' ? '127.0.0.1' : host === '::' ? '::1' : host;
  return new Promise((resolve) => {
    const request = get(
      { host: reachable, port, path: '/api/health', timeout: 3_000 },
      (response) => {
        response.resume();
        resolve(response.statusCode === 200);
      },
    );
    request.on('timeout', () => request.destroy());
    request.on('error', () => resolve(false));
  });
}

/**
 * @param {Shutdown} shutdown
 * @param {Address} address
 * @param {readonly string[]} args of node
 * @param {NodeJS.ProcessEnv} env
 */
function startServer(shutdown, address, args, env) {
  const child = launch(process.execPath, args, {
    env,
    // It ends when its stdin closes, so it cannot outlive us however we end.
    stdio: ['pipe', 'inherit', 'inherit'],
  });
  child.stdin?.on('error', () => undefined); // it has ended, which `ended` tells
  const ended = endOf(child);
  const pid = child.pid;
  if (pid !== undefined) {
    writeFileSync(recordOf(address.dataDir), JSON.stringify(identify(pid)), { mode: 0o600 });
  }
  const forget = shutdown.onStop(async () => {
    if (pid !== undefined) await endProcess(pid, STEPS, true);
    rmSync(recordOf(address.dataDir), { force: true });
  });
  void ended.then(forget);
  return ended;
}

/**
 * Starts the server, waits until it answers, and from then on starts it again when it dies.
 * @param {Shutdown} shutdown
 * @param {Address} address
 * @param {readonly string[]} args of node
 * @param {NodeJS.ProcessEnv} env
 */
export async function serve(shutdown, address, args, env) {
  const { host, port } = address;
  let ended = startServer(shutdown, address, args, env);
  /** @type {string | undefined} */
  let end;
  void ended.then((how) => (end = how));
  const deadline = Date.now() + 90_000;
  while (!(await isHealthy(host, port))) {
    shutdown.throwIfRequested();
    if (end !== undefined) {
      throw new Failure(
        `the server stopped before it answered (${end})`,
        'its last lines above say why',
      );
    }
    if (Date.now() > deadline) {
      throw new Failure(
        `the server did not answer http://${hostInUrl(host)}:${port}/api/health in 90 s`,
        'its lines above and the answer of that address say why',
      );
    }
    await sleep(100);
  }
  void keepServing(shutdown, () => startServer(shutdown, address, args, env), ended);
}

/**
 * @param {Shutdown} shutdown
 * @param {() => Promise<string>} start
 * @param {Promise<string>} ended of the one that runs now
 */
async function keepServing(shutdown, start, ended) {
  /** @type {number[]} */
  let deaths = [];
  for (;;) {
    const how = await ended;
    if (shutdown.isRequested) return;
    deaths = [...deaths.filter((time) => Date.now() - time < 120_000), Date.now()];
    if (deaths.length > 6) {
      shutdown.fail(
        new Failure(
          `the server died ${deaths.length} times in two minutes (${how})`,
          'its lines above say why; then start again',
        ),
      );
      return;
    }
    const pause = 0.5 * 2 ** (deaths.length - 1);
    say(`The server ended unexpectedly (${how}); starting it again in ${pause} s.`);
    await Promise.race([sleep(pause * 1000), shutdown.requested]);
    if (shutdown.isRequested) return;
    ended = start();
  }
}
