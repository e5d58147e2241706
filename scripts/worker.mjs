// @ts-check
import { join } from 'node:path';
import process from 'node:process';
import { checkNode, prepareClone, programEnvironment } from './lib/prepare.mjs';
import { databaseInUse } from './lib/postgres/database-in-use.mjs';
import { endProcess } from './lib/identity.mjs';
import { endOf, launch } from './lib/processes.mjs';
import { Failure, say } from './lib/say.mjs';
import { ROOT, readSettings } from './lib/settings.mjs';
import { live } from './lib/shutdown.mjs';

// npm run worker: one more worker, with one computing thread, on the database of DATABASE_URL or of the Tallybarn that runs here.
await live(async (shutdown) => {
  checkNode();
  const settings = readSettings(process.env);
  const urls =
    settings.ownDatabase ??
    databaseInUse(
      settings,
      new Failure(
        `no Tallybarn is running on ${settings.dataDir}`,
        'run `npm start` first; or set DATABASE_URL to the database of one that runs elsewhere',
      ),
    );
  await prepareClone(shutdown);
  const child = launch(
    process.execPath,
    ['--enable-source-maps', join(ROOT, 'dist/server/worker.js')],
    {
      env: {
        ...programEnvironment(settings, { runtimeUrl: urls.runtimeUrl }),
        STOP_WITH_STDIN: '1',
      },
      stdio: ['pipe', 'inherit', 'inherit'],
    },
  );
  child.stdin?.on('error', () => undefined); // it has ended, which `ended` tells
  const ended = endOf(child);
  shutdown.onStop(async () => {
    if (child.pid === undefined) return;
    await endProcess(
      child.pid,
      [
        ['SIGTERM', 10_000],
        ['SIGKILL', 5_000],
      ],
      true,
    );
  });
  say('A worker is running; Ctrl-C stops it.');
  const how = await Promise.race([ended, shutdown.requested.then(() => 'asked')]);
  if (shutdown.isRequested) {
    say('Stopping; what it holds goes to other workers …');
    await shutdown.stopAll();
    say('Stopped.');
    return 0;
  }
  throw new Failure(`the worker ended (${how})`, 'its lines above say why');
});
