import { Migration } from '@mikro-orm/migrations';
import { RUNTIME_ROLE_SETTING, grantRuntime } from '../grants.ts';
import { PG_BOSS_SCHEMA_24 } from './m004-pg-boss-schema.ts';

const STATES = `'queued', 'running', 'done', 'failed', 'cancelled'`;

/** Jobs with their shares and parts, the workers that live, and the queue that wakes them. */
export class Jobs extends Migration {
  override up(): void {
    this.jobs();
    this.shares();
    this.workers();
    this.queue();
  }

  private jobs(): void {
    this.addSql(`create table jobs (
      id uuid primary key,
      kind text not null check (length(kind) between 1 and 40),
      title text not null check (length(title) between 1 and 300),
      owner_id uuid not null references accounts,
      campaign_id uuid references campaigns,
      input jsonb not null,
      state text not null check (state in (${STATES})),
      done integer not null default 0 check (done between 0 and total),
      total integer not null check (total > 0),
      error text,
      result jsonb,
      created_at timestamptz not null,
      started_at timestamptz,
      served_at timestamptz,
      finished_at timestamptz,
      check ((state = 'failed') = (error is not null))
    )`);
    this.addSql('create index on jobs (owner_id, created_at)');
    this.addSql('create index on jobs (campaign_id)');
    this.addSql(`create index on jobs (served_at) where state in ('queued', 'running')`);
    this.addSql(grantRuntime('jobs', ['select', 'insert', 'update']));
  }

  /** A share is what one worker holds at a time; its attempt is the fencing token of whoever holds it. */
  private shares(): void {
    this.addSql(`create table job_shares (
      job_id uuid not null references jobs,
      n integer not null,
      first_part integer not null check (first_part >= 0),
      end_part integer not null check (end_part >= first_part),
      attempt integer not null default 0,
      losses integer not null default 0,
      worker_id uuid,
      heartbeat_at timestamptz,
      finished_at timestamptz,
      primary key (job_id, n),
      check ((worker_id is null) = (heartbeat_at is null)),
      check (finished_at is null or worker_id is null)
    )`);
    this.addSql('create index on job_shares (job_id, n) where finished_at is null');
    this.addSql(grantRuntime('job_shares', ['select', 'insert', 'update']));
    this.addSql(`create table job_parts (
      job_id uuid not null references jobs,
      n integer not null check (n >= 0),
      content_hash text,
      engine text not null,
      value jsonb not null,
      primary key (job_id, n)
    )`);
    this.addSql('create index on job_parts (content_hash) where content_hash is not null');
    this.addSql(grantRuntime('job_parts', ['select', 'insert']));
  }

  private workers(): void {
    this.addSql(`create table workers (
      id uuid primary key,
      machine text not null,
      pid integer not null,
      version text not null,
      started_at timestamptz not null,
      heartbeat_at timestamptz not null
    )`);
    this.addSql(grantRuntime('workers', ['select', 'insert', 'update', 'delete']));
  }

  /** pg-boss in a schema of its own, with its one queue. The runtime role works in it and cannot change what it is. */
  private queue(): void {
    this.addSql(`do $$ begin
  if to_regnamespace('pgboss') is not null then return; end if;
  if not has_database_privilege(current_database(), 'create') then
    raise exception 'the owner role may not make the schema pgboss: as a superuser run: create schema pgboss authorization %', current_user
      using errcode = 'insufficient_privilege';
  end if;
  create schema pgboss;
end $$`);
    this.addSql(PG_BOSS_SCHEMA_24);
    this.addSql(`select pgboss.create_queue('jobs', '{"policy": "standard", "retryLimit": 0}')`);
    this.addSql(`do $$
declare runtime text := current_setting('${RUNTIME_ROLE_SETTING}');
begin
  if runtime <> current_user then
    execute format('grant usage on schema pgboss to %I', runtime);
    execute format('grant select on pgboss.version, pgboss.queue to %I', runtime);
    execute format('grant update (maintained_on, cron_on, monitored_on) on pgboss.version to %I', runtime);
    execute format('grant select, insert, update, delete on pgboss.job to %I', runtime);
    execute format('grant select, insert, delete on pgboss.archive to %I', runtime);
  end if;
end $$`);
  }
}
