// @ts-check
import { accessSync, constants, mkdirSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { ensureBuild } from './build.mjs';
import { withLock } from './lock.mjs';
import { ensurePackages } from './packages.mjs';
import { run } from './processes.mjs';
import { Failure, errorCode, say } from './say.mjs';
import { ROOT } from './settings.mjs';

/**
 * @typedef {import('./shutdown.mjs').Shutdown} Shutdown
 * @typedef {import('./settings.mjs').Settings} Settings
 */

export function checkNode(version = process.versions.node) {
  if (Number(version.split('.')[0]) >= 20) return;
  throw new Failure(`Node.js ${version} is too old`, 'install Node.js 20 or newer');
}

/**
 * Packages and build of this clone, by one script at a time.
 * @param {Shutdown} shutdown
 * @param {{ build: boolean }} [what]
 */
export async function prepareClone(shutdown, { build } = { build: true }) {
  const dist = join(ROOT, 'dist');
  ensureFolder(dist, 0o755, 'clone Tallybarn into a folder of your own, or run it as its owner');
  await withLock(join(dist, 'prepare.lock'), shutdown, async () => {
    await ensurePackages(shutdown, ROOT);
    if (build) await ensureBuild(shutdown, ROOT);
  });
}

/**
 * @param {string} folder
 * @param {number} mode
 * @param {string} mend
 */
function ensureFolder(folder, mode, mend) {
  try {
    mkdirSync(folder, { recursive: true, mode });
    accessSync(folder, constants.W_OK | constants.X_OK);
  } catch (error) {
    throw new Failure(`the folder ${folder} cannot be written to (${errorCode(error)})`, mend);
  }
}

/**
 * Makes DATA_DIR. As root it may be walked through, so that the account postgres gets to its folder in it; what is
 * secret in it has its own rights.
 * @param {string} dataDir
 */
export function ensureDataDir(dataDir) {
  const mode = process.getuid?.() === 0 ? 0o711 : 0o700;
  ensureFolder(dataDir, mode, 'set DATA_DIR to a folder this account may write to');
}

/**
 * What our programs get of the environment: settings in one place and, with the private database, none of the
 * variables that steer PostgreSQL's own client.
 * @param {Settings} settings
 * @param {{ runtimeUrl: string, ownerUrl?: string }} urls
 * @returns {NodeJS.ProcessEnv}
 */
export function programEnvironment(settings, urls) {
  const ours = settings.ownDatabase === undefined ? /^PG[A-Z]+$/ : /^$/;
  const inherited = Object.entries(process.env).filter(
    ([name]) => !ours.test(name) && !/^(npm_.*|DATABASE_URL|MIGRATION_DATABASE_URL)$/.test(name),
  );
  return {
    ...Object.fromEntries(inherited),
    NODE_ENV: 'production',
    HOST: settings.host,
    PORT: String(settings.port),
    DATA_DIR: settings.dataDir,
    SECRETS_FILE: settings.secretsFile,
    DEMO: settings.demo ? '1' : '0',
    CLIENT_DIR: join(ROOT, 'dist/client'),
    DATABASE_URL: urls.runtimeUrl,
    ...(urls.ownerUrl === undefined ? {} : { MIGRATION_DATABASE_URL: urls.ownerUrl }),
    ...(settings.publicUrl === undefined ? {} : { PUBLIC_URL: settings.publicUrl }),
  };
}

/** @param {string} name of a file of server/commands */
export const commandFile = (name) => join(ROOT, 'dist/server/commands', `${name}.js`);

/**
 * @param {string} name
 * @returns {string[]} arguments of node
 */
const built = (name) => ['--enable-source-maps', commandFile(name)];

/**
 * Brings the schema up to date.
 * @param {Shutdown} shutdown
 * @param {Settings} settings
 * @param {{ runtimeUrl: string, ownerUrl: string }} urls
 * @param {(name: string) => string[]} [program] arguments of node for a command
 */
export async function migrate(shutdown, settings, urls, program = built) {
  say('Bringing the database up to date …');
  await run(shutdown, process.execPath, program('migrate'), {
    what: 'the database could not be brought up to date',
    mend: 'the lines above say why; the database is as it was before the migration that failed',
    cwd: ROOT,
    env: programEnvironment(settings, urls),
    echo: true,
  });
}

/**
 * With the demo on, fills an empty database.
 * @param {Shutdown} shutdown
 * @param {Settings} settings
 * @param {{ runtimeUrl: string }} urls
 * @param {(name: string) => string[]} [program] arguments of node for a command
 */
export async function seedDemo(shutdown, settings, { runtimeUrl }, program = built) {
  if (!settings.demo) return;
  await run(shutdown, process.execPath, program('seed-demo'), {
    what: 'the demo could not be made',
    mend: 'the lines above say why; DEMO=0 npm start does without it',
    cwd: ROOT,
    env: programEnvironment(settings, { runtimeUrl }),
    echo: true,
  });
}
