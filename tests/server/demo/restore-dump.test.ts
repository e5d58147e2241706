import { readFileSync, readdirSync } from 'node:fs';
import type { MikroORM } from '@mikro-orm/postgresql';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { migrate } from '#server/db/migrate.ts';
import { openOrm } from '#server/db/orm.ts';
import { pendingMigrations } from '#server/db/pending.ts';
import { canonicalHash } from '#server/documents/canonical-hash.ts';
import { readDocument } from '#server/documents/read-document.ts';
import { summarise } from '#server/documents/summarise.ts';
import { CaseVersion } from '#server/modules/cases/case-version.entity.ts';
import { listCases } from '#server/modules/cases/list-cases.ts';
import { listVersions, readVersion } from '#server/modules/cases/read-version.ts';
import { CURRENT_FORMAT, caseListQuerySchema } from '#shared/contracts/cases.ts';
import { createTestDatabase, query } from '#tests/support/test-database.ts';
import type { TestDatabase } from '#tests/support/test-database.ts';

const folder = new URL('../../dumps/', import.meta.url);
const dumps = readdirSync(folder)
  .filter((name) => name.endsWith('.sql'))
  .sort();

const RELEASED: readonly { version: string; cases: number }[] = [
  { version: '0.1.0', cases: 8 },
  { version: '0.2.0', cases: 27 },
  { version: '0.3.0', cases: 34 },
];

it('there is a dump of every version that was released', () => {
  expect(dumps).toEqual(RELEASED.map(({ version }) => `tallybarn-${version}.sql`));
});

describe.each(RELEASED)('the dump of $version', ({ version, cases }) => {
  const text = readFileSync(new URL(`tallybarn-${version}.sql`, folder), 'utf8');
  let database: TestDatabase;
  let orm: MikroORM;

  beforeAll(async () => {
    database = await createTestDatabase({ empty: true });
    await query(database.ownerUrl, text);
    await migrate({ databaseUrl: database.runtimeUrl, ownerUrl: database.ownerUrl });
    orm = await openOrm({ databaseUrl: database.runtimeUrl, poolSize: 1 });
  });
  afterAll(async () => {
    await orm.close(true);
    await database.drop();
  });

  it('carries no secret: no password works, and nobody is signed in', async () => {
    const rows = await query(
      database.ownerUrl,
      `select (select count(*)::int from accounts where password_hash <> '!') as passwords,
         (select count(*)::int from sessions) + (select count(*)::int from renewals)
         + (select count(*)::int from personal_tokens) as credentials`,
    );
    expect(rows).toEqual([{ passwords: 0, credentials: 0 }]);
    expect(text).not.toMatch(/\$2[aby]\$/);
  });

  it('is brought up to date by the migrations', async () => {
    expect(await pendingMigrations(orm)).toEqual([]);
  });

  it('every version is read in today’s format and still hashes to its seal', async () => {
    const versions = await orm.em.fork().find(CaseVersion, {});
    expect(versions.length).toBeGreaterThanOrEqual(cases);
    for (const { document, result, engine, hash } of versions) {
      expect(canonicalHash({ document, result, engine })).toBe(hash);
      expect(engine.version).toBe(version);
      const read = readDocument(document);
      expect(read.format).toBe(CURRENT_FORMAT);
      expect(Object.values(summarise(read)).every((line) => line !== '')).toBe(true);
    }
  });

  it('lists and opens every case under the runtime role', async () => {
    const em = orm.em.fork();
    const [manager] = await query(
      database.ownerUrl,
      `select id from accounts where role = 'manager'`,
    );
    const actor = { id: String(manager?.['id']), role: 'manager' } as const;
    const { rows, total } = await listCases(em, actor, caseListQuerySchema.parse({}));
    const counted = await query(database.ownerUrl, 'select count(*)::int as cases from cases');
    expect(counted).toEqual([{ cases: total }]);
    expect(total).toBe(cases);
    for (const { id, n, status } of rows) {
      expect(status).toBe('draft');
      expect((await listVersions(em, id, { page: 1, pageSize: 50 })).items.length).toBe(n);
      expect((await readVersion(em, id, n)).result.estimate.engine.name).toBe('tallybarn');
    }
  });

  it('keeps its guards: versions only grow, for owner and application', async () => {
    const statement = 'delete from case_versions';
    await expect(query(database.ownerUrl, statement)).rejects.toThrow(/only grows/);
    await expect(query(database.runtimeUrl, statement)).rejects.toThrow(/permission denied/);
  });
});
