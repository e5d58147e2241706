import { once } from 'node:events';
import { createServer } from 'node:http';
import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { createApp } from './app.ts';
import { createCompute } from './compute/compute.ts';
import { ConfigError, parseConfig, readSigningKey, requireDatabaseUrl } from './config.ts';
import type { ServerConfig } from './config.ts';
import { checkSchema } from './db/check-schema.ts';
import { openOrm } from './db/orm.ts';
import { endStreams } from './http/event-stream.ts';
import { createLogger } from './http/logging.ts';
import { stopWish } from './stop-wish.ts';

const STOP_MILLISECONDS = 8_000;

async function listen(server: Server, { host, port }: ServerConfig): Promise<AddressInfo> {
  server.listen(port, host);
  try {
    await once(server, 'listening');
  } catch (fault) {
    const code = fault instanceof Error && 'code' in fault ? fault.code : undefined;
    if (code === 'EADDRINUSE') {
      throw new ConfigError(
        `PORT ${port} on ${host} is taken by another program: stop that one or set PORT to another number.`,
      );
    }
    if (code === 'EADDRNOTAVAIL' || code === 'ENOTFOUND') {
      throw new ConfigError(`HOST ${host} is no address of this machine.`);
    }
    if (code === 'EACCES') throw new ConfigError(`PORT ${port} may not be used by this account.`);
    throw fault;
  }
  return server.address() as AddressInfo;
}

/** Lets requests under way finish, within a bound. */
async function drain(server: Server): Promise<void> {
  const closed = new Promise((resolve) => server.close(resolve));
  endStreams();
  // A connection falls idle when its last answer is sent, so they are looked for until none is left.
  const sweep = setInterval(() => server.closeIdleConnections(), 50);
  const bound = setTimeout(() => server.closeAllConnections(), STOP_MILLISECONDS);
  await closed;
  clearInterval(sweep);
  clearTimeout(bound);
}

async function main(): Promise<void> {
  const config = parseConfig(process.env);
  const logger = createLogger(config.logLevel ?? (process.stdout.isTTY ? 'warn' : 'info'));
  const signingKey = readSigningKey(config.secretsFile);
  const orm = await openOrm({ databaseUrl: requireDatabaseUrl(config) });
  const pool = createCompute();
  try {
    await checkSchema(orm, logger);
    const deps = { orm, logger, compute: pool.compute, clock: () => new Date() };
    const app = createApp({ ...deps, config: { ...config, signingKey } });
    const server = createServer({ requestTimeout: 60_000, headersTimeout: 20_000 }, app);
    const wish = stopWish(config);
    const { address, port } = await listen(server, config);
    logger.info({ address, port, version: config.version }, 'listening');
    logger.info({ reason: await wish }, 'stopping');
    await drain(server);
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
  else createLogger('fatal').fatal({ err: fault }, 'the server could not go on');
  process.exit(1);
}
