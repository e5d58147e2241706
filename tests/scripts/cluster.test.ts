import { chmodSync, chownSync, existsSync, mkdirSync, readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { expect, onTestFinished, test } from 'vitest';
import { findBinaries } from '#scripts/lib/postgres/binaries.mjs';
import {
  ADMIN,
  ensureCluster,
  livingPostmaster,
  resetAdminPassword,
  startCluster,
} from '#scripts/lib/postgres/cluster.mjs';
import { ensureDatabase, withConnection } from '#scripts/lib/postgres/database.mjs';
import { findAccount } from '#scripts/lib/postgres/place.mjs';
import { createShutdown } from '#scripts/lib/shutdown.mjs';
import { tempFolder } from './temp-folder.ts';

const secrets = {
  databaseAdminPassword: 'admin-of-this-test',
  databaseOwnerPassword: 'owner-of-this-test',
  databaseRuntimePassword: 'runtime-of-this-test',
  signingKey: 'not-used-in-this-test',
};

function newCluster() {
  const folder = tempFolder();
  chmodSync(folder, 0o711);
  const home = join(folder, 'postgres');
  mkdirSync(home, { mode: 0o700 });
  const account = process.getuid?.() === 0 ? findAccount('postgres') : undefined;
  if (account !== undefined) chownSync(home, account.uid, account.gid);
  const bin = findBinaries()[0]?.bin ?? '';
  const adminPassword = secrets.databaseAdminPassword;
  return { home, bin, account, adminPassword, log: join(folder, 'postgres.log'), options: [] };
}

const select = (url: string, sql: string) => {
  const { port, username, password, pathname } = new URL(url);
  const access = { port: Number(port), user: username, password, database: pathname.slice(1) };
  return withConnection(access, (query) => query(sql));
};

test('the private cluster: two roles, kill -9 and start again, lost secrets, stop', async () => {
  const shutdown = createShutdown();
  onTestFinished(() => shutdown.stopAll());
  const cluster = newCluster();
  await ensureCluster(shutdown, cluster);
  expect(readdirSync(cluster.home)).toEqual(['data']);

  const first = await startCluster(shutdown, cluster);
  const urls = await ensureDatabase(first.port, ADMIN, secrets);
  await select(
    urls.ownerUrl,
    'create table kept (n int); grant select on kept to tallybarn_runtime',
  );
  await select(urls.ownerUrl, 'insert into kept values (42)');
  expect(await select(urls.runtimeUrl, 'select n from kept')).toEqual([{ n: 42 }]);
  for (const sql of [
    'create table no (n int)',
    'drop table kept',
    'create temp table no (n int)',
  ]) {
    await expect(select(urls.runtimeUrl, sql)).rejects.toThrow(/permission denied|must be owner/);
  }
  await expect(
    select(urls.runtimeUrl.replace(':runtime-of', ':wrong-of'), 'select 1'),
  ).rejects.toThrow('password authentication failed');

  process.kill(first.pid, 'SIGKILL');
  expect(await first.ended).toBe('signal SIGKILL');
  const second = await startCluster(shutdown, cluster, first.port);
  expect(second.port).toBe(first.port);
  expect(await select(urls.runtimeUrl, 'select n from kept')).toEqual([{ n: 42 }]);

  // A start that was killed leaves its postmaster running: the next one ends it and takes over.
  const third = await startCluster(shutdown, cluster);
  expect(await second.ended).toBe('code 0');
  expect(livingPostmaster(cluster.home)).toMatchObject({ pid: third.pid, port: third.port });
  await third.stop();
  expect(livingPostmaster(cluster.home)).toBeUndefined();

  const renewed = { ...cluster, adminPassword: 'another-admin-password' };
  await resetAdminPassword(shutdown, renewed);
  const fourth = await startCluster(shutdown, renewed);
  const lost = {
    ...secrets,
    databaseAdminPassword: renewed.adminPassword,
    databaseRuntimePassword: 'another-runtime-password',
  };
  const { runtimeUrl } = await ensureDatabase(fourth.port, ADMIN, lost);
  expect(await select(runtimeUrl, 'select n from kept')).toEqual([{ n: 42 }]);

  await shutdown.stopAll();
  expect(existsSync(join(cluster.home, 'data/postmaster.pid'))).toBe(false);
  const log = readFileSync(cluster.log, 'utf8');
  for (const password of [...Object.values(secrets), ...Object.values(lost)]) {
    expect(log).not.toContain(password);
  }
});
