import { MikroORM, defineConfig } from '@mikro-orm/postgresql';
import { Migrator } from '@mikro-orm/migrations';
import { ENTITIES } from './entities.ts';
import { RUNTIME_ROLE_SETTING } from './grants.ts';
import { MIGRATIONS } from './migrations-list.ts';

export interface OrmOptions {
  /** The application's own URL; migrations grant to its user. */
  databaseUrl: string;
  /** The owner's URL, to migrate; without it the application's. */
  ownerUrl?: string;
  poolSize?: number;
}

export function userOf(url: string): string {
  return decodeURIComponent(new URL(url).username);
}

/** Options of MikroORM: entities and migrations are listed by name, nothing is searched for on disk. */
export function ormConfig({ databaseUrl, ownerUrl, poolSize = 10 }: OrmOptions) {
  const runtimeRole = userOf(databaseUrl);
  return defineConfig({
    clientUrl: ownerUrl ?? databaseUrl,
    entities: ENTITIES,
    extensions: [Migrator],
    ensureDatabase: false,
    // The first query connects: a database that is away for a moment does not keep the server from starting.
    connect: false,
    discovery: { warnWhenNoEntities: false, requireEntitiesArray: true },
    pool: { min: 0, max: poolSize, acquireTimeoutMillis: 10_000 },
    driverOptions: {
      connection: {
        // The driver reads the whole address, with what stands behind its question mark (sslmode).
        connectionString: ownerUrl ?? databaseUrl,
        application_name: 'tallybarn',
        connectionTimeoutMillis: 5_000,
        keepAlive: true,
        options: ownerUrl === undefined ? '' : `-c ${RUNTIME_ROLE_SETTING}=${runtimeRole}`,
      },
    },
    migrations: {
      tableName: 'migrations',
      migrationsList: MIGRATIONS,
      snapshot: false,
      silent: true,
      disableForeignKeys: false,
      allOrNothing: true,
    },
  });
}

export async function openOrm(options: OrmOptions): Promise<MikroORM> {
  return MikroORM.init(ormConfig(options));
}
