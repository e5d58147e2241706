/** The setting each connection of the migrator carries: the role the application runs under. */
export const RUNTIME_ROLE_SETTING = 'tallybarn.runtime_role';

export type Privilege = 'select' | 'insert' | 'update' | 'delete';
const NAME = /^[a-z_][a-z0-9_]*$/;

function checked(name: string): string {
  if (!NAME.test(name)) throw new Error(`"${name}" is no plain table name.`);
  return name;
}

/**
 * SQL that gives the runtime role exactly these privileges on a table. Every migration says what it grants:
 * what it does not name stays closed. Where owner and runtime are one role there is nothing to grant.
 */
export function grantRuntime(table: string, privileges: readonly Privilege[]): string {
  const list = privileges.join(', ');
  return `do $$
declare runtime text := current_setting('${RUNTIME_ROLE_SETTING}');
begin
  if runtime <> current_user then
    execute format('revoke all on table ${checked(table)} from %I', runtime);
    execute format('grant ${list} on table ${checked(table)} to %I', runtime);
  end if;
end $$`;
}

/** SQL that lets a table only grow: even its owner is refused, until someone drops the trigger knowingly. */
export function appendOnly(table: string): string {
  return `create trigger ${checked(table)}_append_only
before update or delete or truncate on ${checked(table)}
for each statement execute function refuse_change()`;
}
