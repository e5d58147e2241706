import { parseConfig, requireDatabaseUrl } from '#server/config.ts';
import { ormConfig } from '#server/db/orm.ts';

/** For the command line of MikroORM alone; the application opens its connections in server/db/orm.ts. */
const config = parseConfig(process.env);
const databaseUrl = requireDatabaseUrl(config);
export default ormConfig({ databaseUrl, ownerUrl: config.migrationDatabaseUrl ?? databaseUrl });
