import { Migration } from '@mikro-orm/migrations';
import { appendOnly, grantRuntime } from '../grants.ts';

/** The lab's library of interactions, which cases cite, and the settings of the lab with their history. */
export class LibraryAndSettings extends Migration {
  override up(): void {
    this.interactions();
    this.interactionVersions();
    this.retries();
    this.citations();
    this.disposalOfDemo();
    this.settings();
  }

  private interactions(): void {
    this.addSql(`create table interactions (
      id uuid primary key,
      name text not null check (length(name) between 1 and 120),
      tags text[] not null,
      owner_id uuid not null references accounts,
      newest_version integer not null check (newest_version > 0),
      search_text text not null,
      created_at timestamptz not null,
      updated_at timestamptz not null,
      lock integer not null default 1
    )`);
    // Two of one name could not be told apart where a case cites one.
    this.addSql('create unique index interactions_name_key on interactions (lower(name))');
    this.addSql('create index on interactions (owner_id)');
    this.addSql(grantRuntime('interactions', ['select', 'insert', 'update']));
  }

  private interactionVersions(): void {
    this.addSql(`create table interaction_versions (
      id uuid primary key,
      interaction_id uuid not null references interactions,
      n integer not null check (n > 0),
      content jsonb not null,
      hash text not null check (hash ~ '^[0-9a-f]{64}$'),
      author_id uuid not null references accounts,
      note text not null,
      created_at timestamptz not null,
      unique (interaction_id, n)
    )`);
    this.addSql(`create table interaction_statuses (
      id bigint generated always as identity primary key,
      interaction_id uuid not null references interactions,
      status text not null check (status in ('published', 'retired')),
      actor_id uuid not null references accounts,
      reason text not null,
      created_at timestamptz not null
    )`);
    this.addSql('create index on interaction_statuses (interaction_id, id)');
    for (const table of ['interaction_versions', 'interaction_statuses']) {
      this.addSql(grantRuntime(table, ['select', 'insert']));
      this.addSql(appendOnly(table));
    }
  }

  /** What a publication was answered, so that a retry after a lost answer does not publish twice. */
  private retries(): void {
    this.addSql(`create table publish_keys (
      account_id uuid not null references accounts,
      key uuid not null,
      fingerprint text not null,
      interaction_id uuid not null references interactions deferrable initially deferred,
      n integer not null,
      lock integer not null,
      created_at timestamptz not null,
      primary key (account_id, key)
    )`);
    this.addSql('create index on publish_keys (created_at)');
    this.addSql('create index on publish_keys (interaction_id)');
    this.addSql(grantRuntime('publish_keys', ['select', 'insert', 'delete']));
  }

  /** Who cites an interaction is asked for on its page. */
  private citations(): void {
    this.addSql(`create index case_versions_citation on case_versions
      ((document #>> '{interaction,citation,id}'))
      where document #> '{interaction,citation}' is not null`);
  }

  /** As remove_demo_cases: interactions of demo accounts go, unless a case that stays cites them or someone else wrote a version. */
  private disposalOfDemo(): void {
    this.addSql(`create function remove_demo_interactions() returns integer language plpgsql
set search_path = public, pg_temp as $$
declare removed integer;
begin
  create temporary table doomed_interactions on commit drop as
    select i.id from interactions i join accounts a on a.id = i.owner_id where a.demo
    and not exists (select from case_versions c
      where c.document #> '{interaction,citation}' is not null
      and c.document #>> '{interaction,citation,id}' = i.id::text)
    and not exists (select from interaction_versions v join accounts w on w.id = v.author_id
      where v.interaction_id = i.id and not w.demo);
  alter table interaction_statuses disable trigger interaction_statuses_append_only;
  alter table interaction_versions disable trigger interaction_versions_append_only;
  delete from publish_keys where interaction_id in (select id from doomed_interactions);
  delete from interaction_statuses where interaction_id in (select id from doomed_interactions);
  delete from interaction_versions where interaction_id in (select id from doomed_interactions);
  delete from interactions where id in (select id from doomed_interactions);
  get diagnostics removed = row_count;
  alter table interaction_versions enable trigger interaction_versions_append_only;
  alter table interaction_statuses enable trigger interaction_statuses_append_only;
  return removed;
end $$`);
    this.addSql('revoke all on function remove_demo_interactions() from public');
  }

  /** The newest row counts; without one the defaults do. Its number decides between two changes at once. */
  private settings(): void {
    this.addSql(`create table settings_versions (
      n integer primary key check (n > 0),
      content jsonb not null,
      author_id uuid not null references accounts,
      note text not null,
      created_at timestamptz not null
    )`);
    this.addSql(grantRuntime('settings_versions', ['select', 'insert']));
    this.addSql(appendOnly('settings_versions'));
  }
}
