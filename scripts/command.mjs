// @ts-check
import { spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { takeLock } from './lib/lock.mjs';
import {
  checkNode,
  commandFile,
  ensureDataDir,
  migrate,
  prepareClone,
  programEnvironment,
} from './lib/prepare.mjs';
import { databaseInUse } from './lib/postgres/database-in-use.mjs';
import { ensurePostgres, openPrivateDatabase } from './lib/postgres/private-database.mjs';
import { endOf } from './lib/processes.mjs';
import { Failure } from './lib/say.mjs';
import { ensureSecrets } from './lib/secrets.mjs';
import { readSettings } from './lib/settings.mjs';
import { live } from './lib/shutdown.mjs';

/** @typedef {import('./lib/settings.mjs').Settings} Settings */

/**
 * @param {import('./lib/shutdown.mjs').Shutdown} shutdown
 * @param {Settings} settings
 */
async function findDatabase(shutdown, settings) {
  if (settings.ownDatabase !== undefined) {
    ensureSecrets(settings.secretsFile, ['signingKey']);
    await migrate(shutdown, settings, settings.ownDatabase);
    return settings.ownDatabase;
  }
  const lock = await takeLock(join(settings.dataDir, 'start.lock'));
  if ('holder' in lock) return databaseInUse(settings);
  shutdown.onStop(async () => lock.release());
  await ensurePostgres(shutdown);
  const { urls } = await openPrivateDatabase(shutdown, settings);
  await migrate(shutdown, settings, urls);
  return urls;
}

// node scripts/command.mjs NAME …: runs server/commands/NAME.ts on the database of DATA_DIR, whether or not Tallybarn runs.
await live(async (shutdown) => {
  checkNode();
  const [name = '', ...args] = process.argv.slice(2);
  const settings = readSettings(process.env);
  ensureDataDir(settings.dataDir);
  await prepareClone(shutdown);
  const file = commandFile(name);
  if (!/^[a-z][a-z-]*$/.test(name) || !existsSync(file)) {
    throw new Failure(`there is no command "${name}"`, 'see the scripts of package.json');
  }
  const urls = await findDatabase(shutdown, settings);
  const child = spawn(process.execPath, ['--enable-source-maps', file, ...args], {
    env: programEnvironment(settings, urls),
    stdio: 'inherit',
  });
  const forget = shutdown.onStop(async () => void child.kill('SIGTERM'));
  const end = await endOf(child);
  forget();
  return end === 'code 0' ? 0 : 1;
});
