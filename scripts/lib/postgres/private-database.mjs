// @ts-check
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { installDebianPackages } from '../debian.mjs';
import { ensureSecrets } from '../secrets.mjs';
import { say } from '../say.mjs';
import { binariesFor, findBinaries } from './binaries.mjs';
import { ADMIN, dataOf, ensureCluster, resetAdminPassword, startCluster } from './cluster.mjs';
import { ensureDatabase } from './database.mjs';
import { findPlace } from './place.mjs';

/**
 * @typedef {import('../shutdown.mjs').Shutdown} Shutdown
 * @typedef {import('../settings.mjs').Settings} Settings
 * @typedef {import('./cluster.mjs').Running} Running
 * @typedef {{ runtimeUrl: string, ownerUrl: string }} Urls
 */

/** @param {Shutdown} shutdown */
export async function ensurePostgres(shutdown) {
  if (findBinaries().length === 0) await installDebianPackages(shutdown, ['postgresql']);
}

/**
 * Starts the private database of DATA_DIR, made if need be. Whoever calls holds the lock of DATA_DIR.
 * @param {Shutdown} shutdown
 * @param {Settings} settings
 * @returns {Promise<{ urls: Urls, running: Running, again: () => Promise<Running> }>}
 */
export async function openPrivateDatabase(shutdown, settings) {
  const { home, account } = findPlace(settings.dataDir);
  const data = dataOf(home);
  const { bin, major } = binariesFor(findBinaries(), data);
  const isNew = !existsSync(data);
  const { secrets, made } = ensureSecrets(settings.secretsFile);
  const cluster = {
    home,
    bin,
    account,
    adminPassword: secrets.databaseAdminPassword,
    log: join(settings.dataDir, 'postgres.log'),
    options: [],
  };
  say(
    isNew
      ? `Making the database in ${home} (PostgreSQL ${major}) …`
      : `Starting the database (PostgreSQL ${major}) …`,
  );
  await ensureCluster(shutdown, cluster);
  if (!isNew && made.includes('databaseAdminPassword')) {
    say('The database passwords were lost; the database is given new ones.');
    await resetAdminPassword(shutdown, cluster);
  }
  const running = await startCluster(shutdown, cluster);
  say(`The database answers on 127.0.0.1:${running.port}.`);
  const urls = await ensureDatabase(running.port, ADMIN, secrets);
  return { urls, running, again: () => startCluster(shutdown, cluster, running.port) };
}
