import { CommandError, runCommand } from '#server/command-line/run-command.ts';
import { parseConfig, requireDatabaseUrl } from '#server/config.ts';
import { openOrm } from '#server/db/orm.ts';
import { removeDemo } from '#server/db/seeders/demo/remove-demo.ts';

/** SQLSTATE of a role that lacks a right. */
const INSUFFICIENT_PRIVILEGE = '42501';

await runCommand(async () => {
  const config = parseConfig(process.env);
  const databaseUrl = requireDatabaseUrl(config);
  const ownerUrl = config.migrationDatabaseUrl ?? databaseUrl;
  const orm = await openOrm({ databaseUrl, ownerUrl, poolSize: 1 });
  try {
    const { accounts, cases } = await removeDemo(orm.em.fork(), new Date());
    process.stdout.write(
      accounts + cases === 0
        ? 'There is no demo to remove.\n'
        : `Removed the sign-in of ${accounts} demo accounts and ${cases} cases; the names stay in the trail. \`npm run admin:create\` makes an administrator.\n`,
    );
  } catch (fault) {
    const code = fault instanceof Error && 'code' in fault ? fault.code : undefined;
    if (code !== INSUFFICIENT_PRIVILEGE) throw fault;
    throw new CommandError(
      'Only the owner of the tables can remove saved versions: set MIGRATION_DATABASE_URL to the owner’s address. Nothing was removed.',
      { cause: fault },
    );
  } finally {
    await orm.close(true);
  }
});
