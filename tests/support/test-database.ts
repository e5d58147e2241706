import { createHash, randomBytes } from 'node:crypto';
import { readFileSync, readdirSync } from 'node:fs';
import pg from 'pg';
import { migrate } from '#server/db/migrate.ts';

/** The two roles of production; the cluster of the tests is thrown away, so their passwords are no secret. */
const OWNER = 'tallybarn_test_owner';
const RUNTIME = 'tallybarn_test_runtime';
const PASSWORD = 'only-for-tests';
/** Any number but that of the migrations. */
const TEMPLATE_LOCK = 4_780_002;

export interface TestDatabase {
  name: string;
  runtimeUrl: string;
  ownerUrl: string;
  adminUrl: string;
  drop: () => Promise<void>;
}

function adminUrl(): string {
  const url = process.env['TEST_DATABASE_ADMIN_URL'];
  if (url) return url;
  throw new Error('TEST_DATABASE_ADMIN_URL is not set; run the tests by `npm test` or vitest.');
}

function urlOf(database: string, user?: string): string {
  const url = new URL(adminUrl());
  url.pathname = `/${database}`;
  if (user) {
    url.username = user;
    url.password = PASSWORD;
  }
  return url.href;
}

async function asAdmin<T>(work: (client: pg.Client) => Promise<T>): Promise<T> {
  const client = new pg.Client({ connectionString: adminUrl() });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

function templateName(): string {
  const folder = new URL('../../server/db/', import.meta.url);
  const files = readdirSync(new URL('migrations/', folder)).sort();
  const text = [...files.map((file) => `migrations/${file}`), 'grants.ts', 'migrations-list.ts']
    .map((file) => readFileSync(new URL(file, folder), 'utf8'))
    .join('\n');
  return `tallybarn_template_${createHash('sha256').update(text).digest('hex').slice(0, 12)}`;
}

async function ensureRoles(client: pg.Client): Promise<void> {
  for (const role of [OWNER, RUNTIME]) {
    const { rowCount } = await client.query('select 1 from pg_roles where rolname = $1', [role]);
    if (!rowCount) await client.query(`create role ${role} login password '${PASSWORD}'`);
  }
}

async function ensureTemplate(client: pg.Client, template: string): Promise<void> {
  const { rowCount } = await client.query('select 1 from pg_database where datname = $1', [
    template,
  ]);
  if (rowCount) return;
  const draft = `${template}_draft`;
  await client.query(`drop database if exists ${draft}`);
  await client.query(`create database ${draft} owner ${OWNER}`);
  await migrate({ databaseUrl: urlOf(draft, RUNTIME), ownerUrl: urlOf(draft, OWNER) });
  await client.query(`alter database ${draft} rename to ${template}`);
}

/** A throw-away database, migrated like production: cloned from a template, or empty and still to be migrated. */
export async function createTestDatabase({ empty = false } = {}): Promise<TestDatabase> {
  const name = `tallybarn_test_${randomBytes(6).toString('hex')}`;
  await asAdmin(async (client) => {
    await client.query('select pg_advisory_lock($1)', [TEMPLATE_LOCK]);
    await ensureRoles(client);
    const template = templateName();
    if (!empty) await ensureTemplate(client, template);
    const from = empty ? '' : `template ${template}`;
    await client.query(`create database ${name} owner ${OWNER} ${from}`);
  });
  return {
    name,
    runtimeUrl: urlOf(name, RUNTIME),
    ownerUrl: urlOf(name, OWNER),
    adminUrl: urlOf(name),
    drop: () =>
      asAdmin(async (client) => {
        await client.query(`drop database if exists ${name} with (force)`);
      }),
  };
}

/** One statement in SQL, under a role of one's choice; its rows. */
export async function query(url: string, sql: string, values: unknown[] = []) {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    const { rows } = await client.query<Record<string, unknown>>(sql, values);
    return rows;
  } finally {
    await client.end();
  }
}
