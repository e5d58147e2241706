import { setPriority } from 'node:os';
import process from 'node:process';
import { createCompute } from './compute/compute.ts';
import { ConfigError, parseConfig, requireDatabaseUrl } from './config.ts';
import { checkSchema } from './db/check-schema.ts';
import { openOrm } from './db/orm.ts';
import { createLogger } from './http/logging.ts';
import { runWorker } from './jobs/worker.ts';
import { stopWish } from './stop-wish.ts';

/** Below the server's: where both share a machine, answers go before jobs. */
const NICENESS = 10;

async function main(): Promise<void> {
  const config = parseConfig(process.env);
  const logger = createLogger(config.logLevel ?? (process.stdout.isTTY ? 'warn' : 'info'));
  const orm = await openOrm({ databaseUrl: requireDatabaseUrl(config), poolSize: 4 });
  setPriority(NICENESS);
  const pool = createCompute({ threads: 1 });
  const stopping = new AbortController();
  void stopWish(config).then((reason) => {
    logger.info({ reason }, 'stopping');
    stopping.abort();
  });
  try {
    await checkSchema(orm, logger);
    logger.info({ pid: process.pid, version: config.version }, 'working');
    await runWorker({ orm, logger, compute: pool.compute }, stopping.signal);
  } finally {
    await pool.close();
    await orm.close(true);
  }
}

try {
  await main();
  process.exit(0);
} catch (fault) {
  if (fault instanceof ConfigError) process.stderr.write(`${fault.message}\n`);
  else createLogger('fatal').fatal({ err: fault }, 'the worker could not go on');
  process.exit(1);
}
