// @ts-check
import {
  chownSync,
  existsSync,
  mkdirSync,
  openSync,
  closeSync,
  readFileSync,
  readdirSync,
  renameSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { endProcess, isRunning, workingFolderOf } from '../identity.mjs';
import { freePort } from '../port.mjs';
import { endOf, launch, run } from '../processes.mjs';
import { Failure, errorCode } from '../say.mjs';
import { answers } from './database.mjs';
import { scramVerifier } from './scram.mjs';

/**
 * @typedef {import('../processes.mjs').Account} Account
 * @typedef {import('../shutdown.mjs').Shutdown} Shutdown
 * @typedef {object} Cluster a cluster and how to run it
 * @property {string} home its folder
 * @property {string} bin PostgreSQL's programs
 * @property {Account | undefined} account whom it runs as, when that is not us
 * @property {string} adminPassword
 * @property {string} log
 * @property {readonly string[]} options further settings, as name=value
 * @typedef {{ port: number, pid: number, ended: Promise<string>, stop: () => Promise<void> }} Running
 */

export const ADMIN = 'tallybarn_admin';

/** PostgreSQL's programs read PG* variables and the locale; ours are the ones that count. */
const ENVIRONMENT = { PATH: '/usr/sbin:/usr/bin:/sbin:/bin', LC_ALL: 'C.UTF-8' };

/** @param {string} home */
export const dataOf = (home) => join(home, 'data');

/**
 * @param {string} home
 * @returns {{ pid: number, port: number } | undefined} the living postmaster of this very cluster
 */
export function livingPostmaster(home) {
  const noted = notedPostmaster(home);
  return noted !== undefined && noted.folder === dataOf(home) ? noted : undefined;
}

/**
 * @param {string} home
 * @returns {{ pid: number, port: number, folder: string } | undefined} the living process whose number the cluster
 *   noted, which after a reboot may be any program
 */
function notedPostmaster(home) {
  try {
    const lines = readFileSync(join(dataOf(home), 'postmaster.pid'), 'utf8').split('\n');
    const pid = Number(lines[0]);
    if (!(pid > 0) || !isRunning(pid)) return undefined;
    return { pid, port: Number(lines[3]), folder: workingFolderOf(pid) };
  } catch (error) {
    if (errorCode(error) !== 'ENOENT') throw error;
    return undefined;
  }
}

/** @param {number} pid */
const stopPostmaster = (pid) =>
  endProcess(pid, [
    ['SIGINT', 15_000],
    ['SIGQUIT', 5_000],
    ['SIGKILL', 5_000],
  ]);

/**
 * Makes the cluster unless it is there. It gets its name only when complete, so a start cut short leaves nothing
 * that looks like one.
 * @param {Shutdown} shutdown
 * @param {Cluster} cluster
 */
export async function ensureCluster(shutdown, cluster) {
  const { home, bin, account, adminPassword } = cluster;
  for (const name of readdirSync(home).filter((each) => /^(making|password)-/.test(each))) {
    rmSync(join(home, name), { recursive: true, force: true });
  }
  if (existsSync(dataOf(home))) return;
  const mark = `${Date.now().toString(36)}`;
  const making = join(home, `making-${mark}`);
  const passwordFile = join(home, `password-${mark}`);
  mkdirSync(making, { mode: 0o700 });
  writeFileSync(passwordFile, adminPassword, { mode: 0o600, flag: 'wx' });
  if (account !== undefined) {
    for (const path of [making, passwordFile]) chownSync(path, account.uid, account.gid);
  }
  const args = [
    ...['-D', making, '-U', ADMIN, `--pwfile=${passwordFile}`, '-A', 'scram-sha-256'],
    ...['-E', 'UTF8', '--locale=C.UTF-8', '--data-checksums'],
  ];
  try {
    await run(shutdown, join(bin, 'initdb'), args, {
      what: 'the database could not be made',
      mend: `look at the lines above and at the space on the disk of ${home}`,
      account,
      cwd: '/',
      env: ENVIRONMENT,
    });
  } finally {
    rmSync(passwordFile, { force: true });
  }
  renameSync(making, dataOf(home));
}

/**
 * Gives the administrator's role our password again, for a cluster whose secrets were lost. Works on a stopped
 * cluster, and what it says is in no process list.
 * @param {Shutdown} shutdown
 * @param {Cluster} cluster
 */
export async function resetAdminPassword(shutdown, cluster) {
  const { home, bin, account, adminPassword } = cluster;
  const living = livingPostmaster(home);
  if (living !== undefined) await stopPostmaster(living.pid);
  await run(shutdown, join(bin, 'postgres'), ['--single', '-D', dataOf(home), 'postgres'], {
    what: 'the database could not be given its new password',
    mend: 'bring back secrets.json from a copy',
    account,
    cwd: '/',
    env: ENVIRONMENT,
    input: `ALTER ROLE ${ADMIN} PASSWORD '${scramVerifier(adminPassword)}'\n`,
  });
}

/**
 * @param {string} log
 * @returns {string} its last lines, for a failure
 */
function lastLines(log) {
  if (!existsSync(log)) return '';
  const lines = readFileSync(log, 'utf8').trimEnd().split('\n').slice(-8);
  return lines.map((line) => `\n  | ${line}`).join('');
}

/**
 * One attempt: starts the postmaster and waits until it answers a query, since its own word comes too early.
 * @param {Shutdown} shutdown
 * @param {Cluster} cluster
 * @param {number} port
 * @returns {Promise<Running | string>} how it ended, where it did not come up
 */
async function attempt(shutdown, cluster, port) {
  const { home, bin, account, adminPassword, log, options } = cluster;
  const settings = [
    'listen_addresses=127.0.0.1',
    `port=${port}`,
    'unix_socket_directories=',
    'password_encryption=scram-sha-256',
    'logging_collector=off',
    'log_destination=stderr',
    'timezone=UTC',
    'log_timezone=UTC',
    ...options,
  ].flatMap((setting) => ['-c', setting]);
  const sink = openSync(log, 'a', 0o600);
  const child = launch(join(bin, 'postgres'), ['-D', dataOf(home), ...settings], {
    account,
    cwd: '/',
    env: ENVIRONMENT,
    stdio: ['ignore', sink, sink],
    orphanSignal: 'INT',
  });
  closeSync(sink);
  const ended = endOf(child);
  const pid = child.pid;
  if (pid === undefined) return ended;
  const stop = async () => {
    forget();
    await stopPostmaster(pid);
  };
  const forget = shutdown.onStop(stop);
  /** @type {string | undefined} */
  let end;
  void ended.then((how) => {
    end = how;
    forget();
  });
  const deadline = Date.now() + 60_000;
  while (end === undefined && Date.now() < deadline) {
    shutdown.throwIfRequested();
    if (await answers({ port, user: ADMIN, password: adminPassword, database: 'postgres' })) {
      return { port, pid, ended, stop };
    }
    await sleep(60);
  }
  await stop();
  return end ?? 'no answer in a minute';
}

/**
 * Starts the cluster on a free port of the loopback address, after whatever ended it before.
 * @param {Shutdown} shutdown
 * @param {Cluster} cluster
 * @param {number} [wantedPort] kept where it is still free, for a server that knows it
 * @returns {Promise<Running>}
 */
export async function startCluster(shutdown, cluster, wantedPort) {
  const { home, log } = cluster;
  const noted = notedPostmaster(home);
  if (noted?.folder === dataOf(home)) {
    await stopPostmaster(noted.pid);
  } else if (noted !== undefined && noted.folder !== '') {
    // The number went to another program, which PostgreSQL would take for itself.
    rmSync(join(dataOf(home), 'postmaster.pid'), { force: true });
  }
  if (existsSync(log) && statSync(log).size > 10_000_000) renameSync(log, `${log}.1`);
  let end = '';
  for (let tries = 0; tries < 20; tries += 1) {
    const port = tries === 0 && wantedPort !== undefined ? wantedPort : await freePort();
    const outcome = await attempt(shutdown, cluster, port);
    if (typeof outcome !== 'string') return outcome;
    end = outcome;
    // After kill -9 of the postmaster its last children may hold the shared memory a moment longer.
    if (!/shared memory|in use|lock file/.test(lastLines(log)) && tries >= 2) break;
    await sleep(500);
  }
  throw new Failure(
    `PostgreSQL did not start (${end})${lastLines(log)}`,
    `the log is ${log}; a full disk and changed rights of ${home} are the usual reasons`,
  );
}
