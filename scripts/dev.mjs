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
import { endOf, launch } from './lib/processes.mjs';
import { Failure, say } from './lib/say.mjs';
import { ensureSecrets } from './lib/secrets.mjs';
import { ROOT, hostInUrl, readSettings } from './lib/settings.mjs';
import { live } from './lib/shutdown.mjs';
import { endProcess } from './lib/identity.mjs';

const PAGE = 'http://127.0.0.1:5173';

/** @param {string} name */
const fromSource = (name) => ['--import', 'tsx', join(ROOT, 'server/commands', `${name}.ts`)];

/**
 * Runs a program until everything stops.
 * @param {import('./lib/shutdown.mjs').Shutdown} shutdown
 * @param {string[]} args of node
 * @param {NodeJS.ProcessEnv} env
 */
function keepRunning(shutdown, args, env) {
  const child = launch(process.execPath, args, { cwd: ROOT, env, stdio: 'inherit' });
  shutdown.onStop(async () => {
    if (child.pid !== undefined) await endProcess(child.pid, [['SIGTERM', 5_000]], true);
  });
  void endOf(child).then((how) => {
    if (shutdown.isRequested) return;
    shutdown.fail(new Failure(`${args.at(-1)} ended (${how})`, 'its lines above say why'));
  });
}

// npm run dev: the page from Vite with updates as files change, the server restarted as its files change.
await live(async (shutdown) => {
  checkNode();
  const wanted = readSettings(process.env);
  ensureDataDir(wanted.dataDir);
  const lock = await takeLock(join(wanted.dataDir, 'start.lock'));
  if ('holder' in lock) {
    throw new Failure(
      `Tallybarn is already running on ${wanted.dataDir} (process ${lock.holder.pid})`,
      'stop it, or set DATA_DIR and PORT for a second one',
    );
  }
  shutdown.onStop(async () => lock.release());
  const settings = {
    ...wanted,
    port: await claimPort(wanted.host, wanted.port),
    publicUrl: wanted.publicUrl ?? PAGE,
  };
  await ensurePostgres(shutdown);
  await prepareClone(shutdown, { build: false });
  ensureSecrets(settings.secretsFile, ['signingKey']);
  const urls = settings.ownDatabase ?? (await openPrivateDatabase(shutdown, settings)).urls;
  await migrate(shutdown, settings, urls, fromSource);
  await seedDemo(shutdown, settings, urls, fromSource);
  const env = {
    ...programEnvironment(settings, { runtimeUrl: urls.runtimeUrl }),
    NODE_ENV: 'development',
  };
  keepRunning(shutdown, ['--watch', '--import', 'tsx', join(ROOT, 'server/main.ts')], env);
  keepRunning(shutdown, ['--watch', '--import', 'tsx', join(ROOT, 'server/worker.ts')], env);
  keepRunning(shutdown, [join(ROOT, 'node_modules/vite/bin/vite.js')], {
    ...process.env,
    API_URL: `http://${hostInUrl(settings.host)}:${settings.port}`,
  });
  say(`The page is at ${PAGE}, the server at ${hostInUrl(settings.host)}:${settings.port}.`);
  await shutdown.requested;
  return 0;
});
