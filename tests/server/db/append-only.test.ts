import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { enqueue } from '#server/outbox/enqueue.ts';
import { Account } from '#server/modules/users/account.entity.ts';
import { recordTrail } from '#server/trail/record-trail.ts';
import { TrailEntry } from '#server/trail/trail-entry.entity.ts';
import { makeAccount } from '#tests/support/factories.ts';
import { createTestApp } from '#tests/support/test-app.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { query } from '#tests/support/test-database.ts';

let app: TestApp;
beforeAll(async () => {
  app = await createTestApp();
  await query(
    app.database.runtimeUrl,
    `insert into trail (at, actor_name, action, subject_type, subject_id)
     values (now(), 'Someone', 'test', 'thing', 'kept')`,
  );
  await query(
    app.database.runtimeUrl,
    `with message as (insert into outbox (at, topic, payload) values (now(), 'test', '{}') returning id)
     select * from message`,
  );
  await query(
    app.database.runtimeUrl,
    `insert into outbox_deliveries (outbox_id, at, outcome) select id, now(), 'delivered' from outbox`,
  );
});
afterAll(() => app.close());

const entry = (subjectId: string) => ({
  actor: { name: 'Someone' },
  action: 'test',
  subject: { type: 'thing', id: subjectId },
  now: new Date(),
});

describe.each(['trail', 'outbox', 'outbox_deliveries'])('%s', (table) => {
  const attempts = [
    `update ${table} set at = now()`,
    `update ${table} set at = now() where false`,
    `delete from ${table}`,
    `truncate ${table} cascade`,
    `insert into ${table} overriding system value select * from ${table} on conflict (id) do update set at = now()`,
  ];

  test.each(attempts)('the runtime role is refused: %s', async (sql) => {
    await expect(query(app.database.runtimeUrl, sql)).rejects.toThrow(
      /permission denied|only grows/,
    );
  });

  test.each(attempts.slice(0, 4))('the owner is refused by the trigger: %s', async (sql) => {
    await expect(query(app.database.ownerUrl, sql)).rejects.toThrow(/only grows/);
  });

  test.each([
    `alter table ${table} disable trigger all`,
    `drop trigger ${table}_append_only on ${table}`,
    `drop table ${table} cascade`,
    `grant update on ${table} to current_user`,
    `alter table ${table} owner to current_user`,
  ])('the runtime role cannot open it: %s', async (sql) => {
    const done = query(app.database.runtimeUrl, sql).then(() =>
      query(app.database.runtimeUrl, `update ${table} set at = now()`),
    );
    await expect(done).rejects.toThrow(/must be owner|permission denied/);
  });
});

test('the row is still there, as it was', async () => {
  const rows = await query(
    app.database.runtimeUrl,
    `select action from trail where subject_id = $1`,
    ['kept'],
  );
  expect(rows).toEqual([{ action: 'test' }]);
});

test('the runtime role makes no tables, schemas, functions, and sets no other role', async () => {
  for (const sql of [
    'create table extra (id int)',
    'create schema extra',
    `create function extra() returns int language sql as 'select 1'`,
    'set role tallybarn_test_owner',
    'create role extra',
  ]) {
    await expect(query(app.database.runtimeUrl, sql)).rejects.toThrow(/permission denied/);
  }
});

test('what a later migration does not grant is closed', async () => {
  await query(app.database.ownerUrl, 'create table forgotten (id int)');
  await expect(query(app.database.runtimeUrl, 'select * from forgotten')).rejects.toThrow(
    /permission denied/,
  );
  await query(app.database.ownerUrl, 'drop table forgotten');
});

test('a transaction that fails leaves neither its change nor its trail', async () => {
  const account = await makeAccount(app.em(), { name: 'Before' });
  const failing = app.em().transactional(async (em) => {
    const held = await em.findOneOrFail(Account, { id: account.id });
    held.name = 'After';
    recordTrail(em, entry(account.id));
    enqueue(em, { topic: 'test', payload: { for: account.id }, now: new Date() });
    await em.flush();
    expect(await em.count(TrailEntry, { subjectId: account.id })).toBe(1);
    throw new Error('and then it fails');
  });
  await expect(failing).rejects.toThrow('and then it fails');
  expect(await app.em().count(TrailEntry, { subjectId: account.id })).toBe(0);
  expect((await app.em().findOneOrFail(Account, { id: account.id })).name).toBe('Before');
  const messages = await query(
    app.database.runtimeUrl,
    `select 1 from outbox where payload ->> 'for' = $1`,
    [account.id],
  );
  expect(messages).toEqual([]);
});

test('a transaction that succeeds leaves both', async () => {
  await app.em().transactional((em) => {
    recordTrail(em, entry('both'));
    return Promise.resolve();
  });
  expect(await app.em().count(TrailEntry, { subjectId: 'both' })).toBe(1);
});

test('no entry is written outside a transaction', () => {
  expect(() => recordTrail(app.em(), entry('alone'))).toThrow(/outside a transaction/);
  expect(() => enqueue(app.em(), { topic: 'x', payload: {}, now: new Date() })).toThrow(
    /outside a transaction/,
  );
});
