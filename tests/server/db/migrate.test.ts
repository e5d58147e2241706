import { afterEach, expect, test } from 'vitest';
import { ENTITIES } from '#server/db/entities.ts';
import { migrate } from '#server/db/migrate.ts';
import { MIGRATIONS } from '#server/db/migrations-list.ts';
import { openOrm } from '#server/db/orm.ts';
import { pendingMigrations } from '#server/db/pending.ts';
import { createTestDatabase, query } from '#tests/support/test-database.ts';
import type { TestDatabase } from '#tests/support/test-database.ts';

const NAMES = MIGRATIONS.map(({ name }) => name);
let database: TestDatabase | undefined;
afterEach(async () => {
  await database?.drop();
});

async function pendingIn(databaseUrl: string): Promise<string[]> {
  const orm = await openOrm({ databaseUrl, poolSize: 1 });
  try {
    return await pendingMigrations(orm);
  } finally {
    await orm.close(true);
  }
}

test('an empty database is migrated once, by whoever comes first of several at once', async () => {
  database = await createTestDatabase({ empty: true });
  const { runtimeUrl: databaseUrl, ownerUrl } = database;
  expect(await pendingIn(databaseUrl)).toEqual(NAMES);
  const applied = await Promise.all([1, 2, 3].map(() => migrate({ databaseUrl, ownerUrl })));
  expect(applied.sort((a, b) => b.length - a.length)).toEqual([NAMES, [], []]);
  expect(await pendingIn(databaseUrl)).toEqual([]);
});

test('every table is granted knowingly: the runtime role reads all, and changes no record that only grows', async () => {
  database = await createTestDatabase();
  const rows = (await query(
    database.adminUrl,
    `select c.relname as table, has_table_privilege($1, c.oid, 'select') as reads,
            has_table_privilege($1, c.oid, 'truncate') as truncates,
            pg_get_userbyid(c.relowner) as owner
       from pg_class c join pg_namespace n on n.oid = c.relnamespace
      where n.nspname = 'public' and c.relkind = 'r'`,
    ['tallybarn_test_runtime'],
  )) as { table: string; reads: boolean; truncates: boolean; owner: string }[];
  expect(rows.length).toBeGreaterThan(8);
  expect(rows.filter(({ reads }) => !reads)).toEqual([]);
  expect(rows.filter(({ truncates }) => truncates)).toEqual([]);
  expect(new Set(rows.map(({ owner }) => owner))).toEqual(new Set(['tallybarn_test_owner']));
});

test('one role for all works too, and the triggers still guard what only grows', async () => {
  database = await createTestDatabase({ empty: true });
  const { ownerUrl } = database;
  expect(await migrate({ databaseUrl: ownerUrl, ownerUrl })).toEqual(NAMES);
  await query(
    ownerUrl,
    `insert into trail (at, actor_name, action, subject_type, subject_id) values (now(), 'a', 'b', 'c', 'd')`,
  );
  await expect(query(ownerUrl, 'delete from trail')).rejects.toThrow(/only grows/);
});

test('a migration that fails leaves the database as it was', async () => {
  database = await createTestDatabase({ empty: true });
  const { runtimeUrl: databaseUrl, ownerUrl } = database;
  await query(ownerUrl, 'create table outbox (id int)');
  await expect(migrate({ databaseUrl, ownerUrl })).rejects.toThrow(/outbox/);
  const tables = await query(ownerUrl, `select to_regclass('accounts') as accounts`);
  expect(tables).toEqual([{ accounts: null }]);
  await query(ownerUrl, 'drop table outbox');
  expect(await migrate({ databaseUrl, ownerUrl })).toEqual(NAMES);
});

test('every entity finds its table and all its columns, as the runtime role', async () => {
  database = await createTestDatabase();
  const orm = await openOrm({ databaseUrl: database.runtimeUrl, poolSize: 1 });
  try {
    for (const entity of ENTITIES)
      await orm.em.fork().find(entity.meta.className, {}, { limit: 1 });
    expect(ENTITIES.length).toBeGreaterThan(7);
  } finally {
    await orm.close(true);
  }
});

test('what stands behind the question mark of an address counts, and passwords may hold any sign', async () => {
  database = await createTestDatabase();
  const { adminUrl, runtimeUrl } = database;
  const strict = new URL(runtimeUrl);
  strict.searchParams.set('sslmode', 'verify-full');
  const orm = await openOrm({ databaseUrl: strict.href, poolSize: 1 });
  await expect(orm.em.getConnection().execute('select 1')).rejects.toThrow(/SSL/);
  await orm.close(true);

  const role = `odd_${database.name}`;
  const password = 'a/b@c:d?e#f%20é';
  await query(adminUrl, `create role ${role} login password '${password}'`);
  try {
    const odd = new URL(runtimeUrl);
    odd.username = role;
    odd.password = encodeURIComponent(password);
    const opened = await openOrm({ databaseUrl: odd.href, poolSize: 1 });
    const rows = await opened.em.getConnection().execute('select current_user as me');
    await opened.close(true);
    expect(rows).toEqual([{ me: role }]);
  } finally {
    await query(adminUrl, `drop role ${role}`);
  }
});
