import { Migration } from '@mikro-orm/migrations';
import { appendOnly, grantRuntime } from '../grants.ts';

const STATUSES = `'draft', 'inReview', 'approved', 'released', 'superseded', 'withdrawn'`;

/** Campaigns, cases with their append-only versions and statuses, and the disposal of the demo. */
export class Cases extends Migration {
  override up(): void {
    this.campaigns();
    this.cases();
    this.versions();
    this.retries();
    this.disposalOfDemo();
  }

  private campaigns(): void {
    this.addSql(`create table campaigns (
      id uuid primary key,
      name text not null unique check (length(name) between 1 and 120),
      created_by uuid not null references accounts,
      created_at timestamptz not null
    )`);
    this.addSql(grantRuntime('campaigns', ['select', 'insert', 'update']));
    this.addSql(`create table campaign_members (
      campaign_id uuid not null references campaigns,
      account_id uuid not null references accounts,
      created_at timestamptz not null,
      primary key (campaign_id, account_id)
    )`);
    this.addSql('create index on campaign_members (account_id)');
    this.addSql(grantRuntime('campaign_members', ['select', 'insert', 'delete']));
  }

  private cases(): void {
    // One locked row, not a sequence: a failed save must not burn a number.
    this.addSql(`create table case_numbers (
      only_row boolean primary key default true check (only_row),
      last integer not null
    )`);
    this.addSql('insert into case_numbers (last) values (0)');
    this.addSql(grantRuntime('case_numbers', ['select', 'update']));
    this.addSql(`create table cases (
      id uuid primary key,
      number integer not null unique check (number > 0),
      title text not null check (length(title) between 1 and 200),
      tags text[] not null,
      owner_id uuid not null references accounts,
      campaign_id uuid references campaigns,
      newest_version integer not null check (newest_version > 0),
      summary jsonb not null,
      search_text text not null,
      created_at timestamptz not null,
      updated_at timestamptz not null,
      lock integer not null default 1
    )`);
    this.addSql('create index on cases (owner_id)');
    this.addSql('create index on cases (campaign_id)');
    this.addSql('create index on cases (updated_at)');
    this.addSql(grantRuntime('cases', ['select', 'insert', 'update']));
  }

  private versions(): void {
    this.addSql(`create table case_versions (
      id uuid primary key,
      case_id uuid not null references cases,
      n integer not null check (n > 0),
      title text not null,
      tags text[] not null,
      format integer not null,
      document jsonb not null,
      result jsonb not null,
      engine jsonb not null,
      hash text not null check (hash ~ '^[0-9a-f]{64}$'),
      author_id uuid not null references accounts,
      note text not null,
      created_at timestamptz not null,
      unique (case_id, n)
    )`);
    this.addSql(`create table version_statuses (
      id bigint generated always as identity primary key,
      version_id uuid not null references case_versions,
      status text not null check (status in (${STATUSES})),
      actor_id uuid not null references accounts,
      reason text not null,
      created_at timestamptz not null
    )`);
    this.addSql('create index on version_statuses (version_id, id)');
    for (const table of ['case_versions', 'version_statuses']) {
      this.addSql(grantRuntime(table, ['select', 'insert']));
      this.addSql(appendOnly(table));
    }
  }

  /** What a save was answered, so that a retry after a lost answer does not save twice. */
  private retries(): void {
    this.addSql(`create table save_keys (
      account_id uuid not null references accounts,
      key uuid not null,
      fingerprint text not null,
      case_id uuid not null references cases deferrable initially deferred,
      n integer not null,
      lock integer not null,
      created_at timestamptz not null,
      primary key (account_id, key)
    )`);
    this.addSql('create index on save_keys (created_at)');
    this.addSql('create index on save_keys (case_id)');
    this.addSql(grantRuntime('save_keys', ['select', 'insert', 'delete']));
  }

  /**
   * The only way a version is ever deleted here: owned by the owner's role, runs with the rights of the caller, and lifts
   * the guards of the two tables for its own transaction, which only their owner can.
   */
  private disposalOfDemo(): void {
    this.addSql(`create function remove_demo_cases() returns integer language plpgsql
set search_path = public, pg_temp as $$
declare removed integer;
begin
  create temporary table doomed on commit drop as
    select c.id from cases c join accounts a on a.id = c.owner_id where a.demo;
  alter table version_statuses disable trigger version_statuses_append_only;
  alter table case_versions disable trigger case_versions_append_only;
  delete from save_keys where case_id in (select id from doomed);
  delete from version_statuses where version_id in
    (select v.id from case_versions v join doomed d on d.id = v.case_id);
  delete from case_versions where case_id in (select id from doomed);
  delete from cases where id in (select id from doomed);
  get diagnostics removed = row_count;
  alter table case_versions enable trigger case_versions_append_only;
  alter table version_statuses enable trigger version_statuses_append_only;
  return removed;
end $$`);
    this.addSql('revoke all on function remove_demo_cases() from public');
  }
}
