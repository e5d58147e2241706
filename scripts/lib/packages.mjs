// @ts-check
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, realpathSync, rmSync, writeFileSync } from 'node:fs';
import { delimiter, dirname, join } from 'node:path';
import process from 'node:process';
import { run } from './processes.mjs';
import { Failure, errorCode, say } from './say.mjs';

/**
 * @param {string} path
 * @returns {string} the text, empty when there is no such file
 */
function textOf(path) {
  try {
    return readFileSync(path, 'utf8');
  } catch (error) {
    if (errorCode(error) !== 'ENOENT') throw error;
    return '';
  }
}

/**
 * @param {string} lockText
 * @returns {string} what the installed tree has to carry to count as that of this lock file on this machine
 */
export function packagesStamp(lockText) {
  const platform = `${process.platform} ${process.arch}`;
  return createHash('sha256').update(`${platform}\n${lockText}`).digest('hex');
}

/**
 * Whether the tree npm says it installed has every package of the lock file at its version. Packages for other
 * machines (optional ones) may be missing.
 * @param {string} lockText package-lock.json
 * @param {string} installedText node_modules/.package-lock.json, which npm writes last
 * @returns {boolean}
 */
export function isInstalled(lockText, installedText) {
  if (lockText === '' || installedText === '') return false;
  /** @typedef {{ packages: Record<string, { version?: string, optional?: boolean, devOptional?: boolean, peer?: boolean }> }} Lock */
  /** @type {Lock} */
  const lock = JSON.parse(lockText);
  /** @type {Lock} */
  const installed = JSON.parse(installedText);
  return Object.entries(lock.packages).every(([path, wanted]) => {
    if (path === '') return true;
    const present = installed.packages[path];
    if (present === undefined) return wanted.optional === true;
    return present.version === wanted.version;
  });
}

/**
 * @param {NodeJS.ProcessEnv} env
 * @returns {string[]} the command that runs npm
 */
export function findNpm(env) {
  const given = env['npm_execpath'];
  if (given !== undefined && /npm-cli\.c?js$/.test(given) && existsSync(given)) {
    return [process.execPath, given];
  }
  const beside = join(dirname(process.execPath), '../lib/node_modules/npm/bin/npm-cli.js');
  if (existsSync(beside)) return [process.execPath, beside];
  for (const folder of (env['PATH'] ?? '').split(delimiter)) {
    const candidate = join(folder, 'npm');
    if (folder !== '' && existsSync(candidate)) return [realpathSync(candidate)];
  }
  throw new Failure('npm was not found', 'install npm: apt-get install -y npm');
}

/**
 * Installs the npm packages when they are missing or not those of package-lock.json.
 * @param {import('./shutdown.mjs').Shutdown} shutdown
 * @param {string} root
 */
export async function ensurePackages(shutdown, root) {
  const lockText = textOf(join(root, 'package-lock.json'));
  const stampFile = join(root, 'node_modules/.tallybarn-stamp');
  const stamp = packagesStamp(lockText);
  if (textOf(stampFile) === stamp) return;
  if (!isInstalled(lockText, textOf(join(root, 'node_modules/.package-lock.json')))) {
    say('Installing npm packages (a minute or two the first time) …');
    rmSync(stampFile, { force: true });
    const [command = '', ...before] = findNpm(process.env);
    const args = [...before, 'ci', '--include=dev', '--prefer-offline', '--no-audit', '--no-fund'];
    await run(shutdown, command, args, {
      what: 'the npm packages could not be installed',
      mend: 'check the network (behind a proxy: npm config set proxy) and the space on the disk, then run it again',
      cwd: root,
      heartbeat: 'installing npm packages',
      // It is slow to heed a milder word, and what it leaves half done is done again from the start.
      stopWith: [['SIGKILL', 5_000]],
      orphanSignal: 'KILL',
    });
    say('npm packages are installed.');
  }
  writeFileSync(stampFile, stamp);
}
