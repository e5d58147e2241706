// @ts-check
import { join } from 'node:path';
import process from 'node:process';
import { takeLock } from './lib/lock.mjs';
import { claimPort } from './lib/port.mjs';
import {
  checkNode,
  ensureDataDir,
  migrate,
  prepareClone,
  programEnvironment,
  seedDemo,
} from './lib/prepare.mjs';
import { ensurePostgres, openPrivateDatabase } from './lib/postgres/private-database.mjs';
import { Failure, say } from './lib/say.mjs';
import { ensureSecrets } from './lib/secrets.mjs';
import { serve, stopLeftoverServer } from './lib/server-process.mjs';
import { ROOT, hostInUrl, readSettings } from './lib/settings.mjs';
import { live } from './lib/shutdown.mjs';
import { keepWorker } from './lib/worker-process.mjs';

/**
 * @typedef {import('./lib/shutdown.mjs').Shutdown} Shutdown
 * @typedef {import('./lib/settings.mjs').Settings} Settings
 */

/**
 * @param {Shutdown} shutdown
 * @param {string} dataDir
 */
async function holdDataDir(shutdown, dataDir) {
  ensureDataDir(dataDir);
  const lock = await takeLock(join(dataDir, 'start.lock'));
  if ('holder' in lock) {
    throw new Failure(
      `Tallybarn is already running on ${dataDir} (process ${lock.holder.pid})`,
      'use that one, stop it with Ctrl-C, or set DATA_DIR and PORT for a second one',
    );
  }
  shutdown.onStop(async () => lock.release());
}

/**
 * Starts a dead PostgreSQL again, on the port the server knows, unless it keeps dying.
 * @param {Shutdown} shutdown
 * @param {Awaited<ReturnType<typeof openPrivateDatabase>>} database
 */
async function keepDatabase(shutdown, { running, again }) {
  let current = running;
  /** @type {number[]} */
  let deaths = [];
  while (deaths.length < 5) {
    const how = await current.ended;
    if (shutdown.isRequested) return;
    deaths = [...deaths.filter((time) => Date.now() - time < 600_000), Date.now()];
    say(`PostgreSQL ended unexpectedly (${how}); starting it again.`);
    current = await again();
    if (current.port !== running.port) {
      throw new Failure('the port of PostgreSQL was taken meanwhile', 'start Tallybarn again');
    }
    say('PostgreSQL answers again.');
  }
  throw new Failure(
    'PostgreSQL ended five times in ten minutes',
    'postgres.log in DATA_DIR says why; then start Tallybarn again',
  );
}

/**
 * @param {Shutdown} shutdown
 * @param {Settings} settings
 */
async function openDatabase(shutdown, settings) {
  const { ownDatabase } = settings;
  if (ownDatabase !== undefined) {
    ensureSecrets(settings.secretsFile, ['signingKey']);
    return ownDatabase;
  }
  const database = await openPrivateDatabase(shutdown, settings);
  keepDatabase(shutdown, database).catch((error) => {
    if (!shutdown.isRequested) shutdown.fail(error);
  });
  return database.urls;
}

await live(async (shutdown) => {
  checkNode();
  const wanted = readSettings(process.env);
  await holdDataDir(shutdown, wanted.dataDir);
  await stopLeftoverServer(wanted.dataDir);
  await claimPort(wanted.host, wanted.port);
  if (wanted.ownDatabase === undefined) {
    await Promise.all([ensurePostgres(shutdown), prepareClone(shutdown)]);
  } else {
    await prepareClone(shutdown);
  }
  const urls = await openDatabase(shutdown, wanted);
  await migrate(shutdown, wanted, urls);
  const settings = { ...wanted, port: await claimPort(wanted.host, wanted.port) };
  const env = {
    ...programEnvironment(settings, { runtimeUrl: urls.runtimeUrl }),
    STOP_WITH_STDIN: '1',
  };
  const program = ['--enable-source-maps', join(ROOT, 'dist/server/main.js')];
  // The demo is looked after while the server starts; the ready line waits for both.
  await Promise.all([seedDemo(shutdown, settings, urls), serve(shutdown, settings, program, env)]);
  keepWorker(shutdown, settings, env);
  say(`Tallybarn is ready at http://${hostInUrl(settings.host)}:${settings.port}`);
  say('Ctrl-C stops it.');
  const reason = await shutdown.requested;
  say(`Stopping (${reason}) …`);
  await shutdown.stopAll();
  say('Stopped.');
  return 0;
});
