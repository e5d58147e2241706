// @ts-check
import { existsSync, readdirSync } from 'node:fs';
import process from 'node:process';
import { run } from './processes.mjs';
import { Failure, say } from './say.mjs';

/** Left in peace for long when everything stops: a package half unpacked has to be repaired by hand. */
const GENTLY = /** @type {[NodeJS.Signals, number][]} */ ([
  ['SIGINT', 60_000],
  ['SIGTERM', 20_000],
  ['SIGKILL', 5_000],
]);

/**
 * @param {readonly string[]} packages
 * @returns {string} the one command that installs them
 */
export function installCommand(packages) {
  return `sudo apt-get install -y --no-install-recommends ${packages.join(' ')}`;
}

/** @returns {string[]} Debian's own clusters, as `15 main` */
function systemClusters() {
  const folder = '/etc/postgresql';
  if (!existsSync(folder)) return [];
  return readdirSync(folder).flatMap((version) =>
    readdirSync(`${folder}/${version}`).map((name) => `${version} ${name}`),
  );
}

/**
 * @param {import('./shutdown.mjs').Shutdown} shutdown
 * @param {string} what failed, if it does
 * @param {string} mend
 * @param {string} command
 * @param {readonly string[]} args
 */
function quietly(shutdown, what, mend, command, args) {
  return run(shutdown, command, args, {
    what,
    mend: `look at the lines above, then ${mend}`,
    cwd: '/',
    env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive', LC_ALL: 'C.UTF-8' },
    heartbeat: 'installing Debian packages',
    stopWith: GENTLY,
    stopNotice: 'Waiting for the Debian packages to come to a safe stop …',
    orphanSignal: 'INT',
  });
}

/**
 * Waits for another installation on the machine to end.
 * @param {import('./shutdown.mjs').Shutdown} shutdown
 * @param {string} what failed, if it does
 * @param {string} mend
 * @param {readonly string[]} args
 */
function aptGet(shutdown, what, mend, args) {
  const patient = ['-o', 'DPkg::Lock::Timeout=120'];
  return quietly(shutdown, what, mend, 'apt-get', [...patient, ...args]);
}

/**
 * Installs Debian packages as root; as anyone else says the command that is missing.
 * @param {import('./shutdown.mjs').Shutdown} shutdown
 * @param {readonly string[]} packages
 */
export async function installDebianPackages(shutdown, packages) {
  if (packages.length === 0) return;
  const names = packages.join(', ');
  const mend = `run: ${installCommand(packages)}`;
  if (process.getuid?.() !== 0) throw new Failure(`missing on this machine: ${names}`, mend);
  if (!existsSync('/usr/bin/apt-get')) {
    throw new Failure(
      `missing on this machine: ${names}, and there is no apt-get`,
      'install them by hand',
    );
  }
  say(`Installing Debian packages: ${names} …`);
  const before = systemClusters();
  await aptGet(shutdown, 'the list of Debian packages could not be fetched', mend, ['update']);
  const install = () =>
    aptGet(shutdown, `Debian could not install ${names}`, mend, [
      ...['install', '-y', '--no-install-recommends'],
      ...packages,
    ]);
  try {
    await install();
  } catch (error) {
    if (!(error instanceof Failure && error.message.includes('dpkg --configure -a'))) throw error;
    say('An earlier installation was cut short; it is finished first …');
    await quietly(shutdown, 'that installation could not be finished', mend, 'dpkg', [
      '--configure',
      '-a',
    ]);
    await install();
  }
  for (const cluster of systemClusters().filter((name) => !before.includes(name))) {
    // Debian starts an empty cluster of its own with the package; ours is private and does not need it.
    const [version = '', name = ''] = cluster.split(' ');
    await run(shutdown, 'sh', ['-c', 'pg_ctlcluster "$1" "$2" stop || true', 'sh', version, name], {
      what: "Debian's own cluster could not be stopped",
      mend: `run: pg_ctlcluster ${cluster} stop`,
      cwd: '/',
    });
  }
  say('Debian packages are installed.');
}
