import { CommandError, runCommand } from '#server/command-line/run-command.ts';
import { parseConfig, requireDatabaseUrl } from '#server/config.ts';
import { isDatabaseAway } from '#server/db/faults.ts';
import { migrate } from '#server/db/migrate.ts';

await runCommand(async () => {
  const config = parseConfig(process.env);
  const databaseUrl = requireDatabaseUrl(config);
  const ownerUrl = config.migrationDatabaseUrl ?? databaseUrl;
  if (ownerUrl === databaseUrl) {
    process.stderr.write(
      'Warning: MIGRATION_DATABASE_URL is not set, so the application owns its tables; the trail is then guarded by triggers alone.\n',
    );
  }
  try {
    const applied = await migrate({ databaseUrl, ownerUrl });
    process.stdout.write(
      applied.length === 0
        ? 'The database is up to date.\n'
        : `Applied to the database: ${applied.join(', ')}.\n`,
    );
  } catch (fault) {
    if (!isDatabaseAway(fault)) throw fault;
    throw new CommandError(
      'The database does not answer; see MIGRATION_DATABASE_URL and DATABASE_URL.',
      { cause: fault },
    );
  }
});
