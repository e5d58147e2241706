import type { MikroORM } from '@mikro-orm/postgresql';
import type { Logger } from 'pino';
import { ConfigError } from '#server/config.ts';
import { isDatabaseAway } from './faults.ts';
import { pendingMigrations } from './pending.ts';

/** The database must have the schema of this version; one that is away may come back, and is waited for. */
export async function checkSchema(orm: MikroORM, logger: Logger): Promise<void> {
  try {
    const pending = await pendingMigrations(orm);
    if (pending.length === 0) return;
    throw new ConfigError(
      `The database lacks ${pending.join(', ')}: run the migrations (\`npm start\` does).`,
    );
  } catch (fault) {
    if (!isDatabaseAway(fault)) throw fault;
    logger.warn({ err: fault }, 'the database does not answer yet');
  }
}
