import { Migration } from '@mikro-orm/migrations';
import { RUNTIME_ROLE_SETTING, appendOnly, grantRuntime } from '../grants.ts';

const ROLES = `'experimentalist', 'theorist', 'manager', 'administrator'`;

/** Accounts, sessions, tokens, the throttle of sign-ins, and the two tables that only grow. */
export class GroundFloor extends Migration {
  override up(): void {
    this.closeByDefault();
    this.accounts();
    this.sessions();
    this.appendOnlyTables();
    this.addSql(grantRuntime('migrations', ['select']));
  }

  /** What a later migration forgets to grant is closed, whatever defaults the server was set up with. */
  private closeByDefault(): void {
    this.addSql(`do $$
declare runtime text := current_setting('${RUNTIME_ROLE_SETTING}');
begin
  if runtime <> current_user then
    execute format('alter default privileges revoke all on tables from %I', runtime);
    execute format('alter default privileges revoke all on sequences from %I', runtime);
    execute format('grant usage on schema public to %I', runtime);
  end if;
  alter default privileges revoke execute on functions from public;
  if has_schema_privilege(current_user, 'public', 'create with grant option') then
    revoke create on schema public from public;
  end if;
end $$`);
    this.addSql(`create function refuse_change() returns trigger language plpgsql as $$
begin
  raise exception 'the table % only grows: % is refused', tg_table_name, lower(tg_op)
    using errcode = 'insufficient_privilege';
end $$`);
  }

  private accounts(): void {
    this.addSql(`create table accounts (
      id uuid primary key,
      email text not null unique check (email = lower(email) and length(email) between 3 and 254),
      name text not null check (length(name) between 1 and 120),
      role text not null check (role in (${ROLES})),
      password_hash text not null,
      active boolean not null,
      demo boolean not null,
      created_at timestamptz not null,
      version integer not null default 1
    )`);
    this.addSql(grantRuntime('accounts', ['select', 'insert', 'update']));
    this.addSql(`create table personal_tokens (
      id uuid primary key,
      account_id uuid not null references accounts,
      name text not null check (length(name) between 1 and 80),
      scope text not null check (scope in ('read', 'write')),
      token_hash text not null unique,
      created_at timestamptz not null,
      expires_at timestamptz not null check (expires_at > created_at),
      last_used_at timestamptz,
      revoked_at timestamptz
    )`);
    this.addSql('create index on personal_tokens (account_id)');
    this.addSql(grantRuntime('personal_tokens', ['select', 'insert', 'update']));
  }

  private sessions(): void {
    this.addSql(`create table sessions (
      id uuid primary key,
      account_id uuid not null references accounts,
      created_at timestamptz not null,
      last_seen_at timestamptz not null,
      ended_at timestamptz,
      end_reason text,
      check ((ended_at is null) = (end_reason is null))
    )`);
    this.addSql('create index on sessions (account_id)');
    this.addSql('create index on sessions (created_at)');
    this.addSql(grantRuntime('sessions', ['select', 'insert', 'update', 'delete']));
    this.addSql(`create table renewals (
      id uuid primary key,
      session_id uuid not null references sessions on delete cascade,
      token_hash text not null unique,
      created_at timestamptz not null,
      used_at timestamptz
    )`);
    this.addSql('create index on renewals (session_id)');
    this.addSql(grantRuntime('renewals', ['select', 'insert', 'update', 'delete']));
    this.addSql(`create table sign_in_failures (
      id bigint generated always as identity primary key,
      account_key text not null,
      address text not null,
      at timestamptz not null
    )`);
    this.addSql('create index on sign_in_failures (account_key, at)');
    this.addSql('create index on sign_in_failures (address, at)');
    this.addSql(grantRuntime('sign_in_failures', ['select', 'insert', 'delete']));
  }

  private appendOnlyTables(): void {
    this.addSql(`create table trail (
      id bigint generated always as identity primary key,
      at timestamptz not null,
      actor_id uuid,
      actor_name text not null,
      actor_via text,
      action text not null,
      subject_type text not null,
      subject_id text not null,
      before jsonb,
      after jsonb
    )`);
    this.addSql('create index on trail (subject_type, subject_id)');
    this.addSql('create index on trail (at)');
    this.addSql(`create table outbox (
      id bigint generated always as identity primary key,
      at timestamptz not null,
      topic text not null,
      payload jsonb not null
    )`);
    this.addSql(`create table outbox_deliveries (
      id bigint generated always as identity primary key,
      outbox_id bigint not null references outbox,
      at timestamptz not null,
      outcome text not null check (outcome in ('delivered', 'failed')),
      detail text
    )`);
    this.addSql('create index on outbox_deliveries (outbox_id)');
    for (const table of ['trail', 'outbox', 'outbox_deliveries']) {
      this.addSql(grantRuntime(table, ['select', 'insert']));
      this.addSql(appendOnly(table));
    }
  }
}
