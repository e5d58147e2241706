import pg from 'pg';
import { openOrm } from './orm.ts';

/** Any number, as long as every version of the application uses the same. */
const MIGRATION_LOCK = 4_780_001;

export interface MigrationUrls {
  databaseUrl: string;
  ownerUrl: string;
}

/**
 * Brings the schema up to date, one process at a time: a second one waits and finds nothing to do.
 * Returns the names of what was applied.
 */
export async function migrate({ databaseUrl, ownerUrl }: MigrationUrls): Promise<string[]> {
  const lock = new pg.Client({ connectionString: ownerUrl, connectionTimeoutMillis: 10_000 });
  await lock.connect();
  try {
    await lock.query('select pg_advisory_lock($1)', [MIGRATION_LOCK]);
    const orm = await openOrm({ databaseUrl, ownerUrl, poolSize: 2 });
    try {
      const applied = await orm.getMigrator().up();
      return applied.map(({ name }) => name);
    } finally {
      await orm.close(true);
    }
  } finally {
    await lock.end();
  }
}
