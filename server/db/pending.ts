import type { MikroORM } from '@mikro-orm/postgresql';
import { MIGRATIONS } from './migrations-list.ts';

/** Names of migrations the database lacks; all of them where it is empty. */
export async function pendingMigrations(orm: MikroORM): Promise<string[]> {
  const connection = orm.em.getConnection();
  const [table] = await connection.execute<{ found: boolean }[]>(
    `select to_regclass('public.migrations') is not null as found`,
  );
  if (!table?.found) return MIGRATIONS.map(({ name }) => name);
  const rows = await connection.execute<{ name: string }[]>('select name from migrations');
  const done = new Set(rows.map(({ name }) => name));
  return MIGRATIONS.map(({ name }) => name).filter((name) => !done.has(name));
}
