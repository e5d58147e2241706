import { execFile } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { findBinaries } from '#scripts/lib/postgres/binaries.mjs';
import { startTestCluster } from '#scripts/lib/postgres/test-cluster.mjs';
import { live } from '#scripts/lib/shutdown.mjs';
import { ENGINE } from '#server/compute/engine-kinds.ts';
import { openOrm } from '#server/db/orm.ts';
import { NO_PASSWORD } from '#server/db/seeders/demo/remove-demo.ts';
import { seedDemo } from '#server/db/seeders/demo/seed-demo.ts';
import { VERSION } from '#server/version.ts';
import { createTestDatabase, query } from '#tests/support/test-database.ts';
import type { TestDatabase } from '#tests/support/test-database.ts';

// npx tsx scripts/dump-demo.ts: writes tests/dumps/tallybarn-VERSION.sql, the demo as this version stores it. It is made
// once, when its version is released: later migrations are tested on it as it was.

async function fill(database: TestDatabase): Promise<void> {
  const orm = await openOrm({ databaseUrl: database.runtimeUrl });
  await seedDemo({
    em: orm.em.fork(),
    compute: (kind, input) => Promise.resolve(ENGINE[kind](input)),
    clock: () => new Date(),
    passwordCost: 4,
  });
  await orm.close(true);
  await query(database.ownerUrl, 'update accounts set password_hash = $1', [NO_PASSWORD]);
}

/** Rows as statements, so that any client can restore it; what only one version of psql or of the server knows is left out. */
async function dump(database: TestDatabase): Promise<string> {
  const bin = findBinaries()[0]?.bin ?? '';
  const options = ['--no-owner', '--no-comments', '--inserts', '--rows-per-insert=1'];
  const { stdout } = await promisify(execFile)(
    join(bin, 'pg_dump'),
    [...options, `--dbname=${database.ownerUrl}`],
    { maxBuffer: 1e8 },
  );
  const unknownElsewhere = /^(\\(un)?restrict\b|--|SET transaction_timeout\b)/;
  const lines = stdout.split('\n').filter((line) => !unknownElsewhere.test(line));
  return `${lines
    .join('\n')
    .replace(/\n{3,}/g, '\n\n')
    .trim()}\n`;
}

await live(async (shutdown) => {
  const cluster = await startTestCluster(shutdown);
  process.env['TEST_DATABASE_ADMIN_URL'] = cluster.adminUrl;
  const database = await createTestDatabase();
  await fill(database);
  const text = `-- The demo of Tallybarn ${VERSION}, written by scripts/dump-demo.ts. No password works.\n${await dump(database)}`;
  writeFileSync(new URL(`../tests/dumps/tallybarn-${VERSION}.sql`, import.meta.url), text);
  await database.drop();
  await cluster.stop();
  return 0;
});
