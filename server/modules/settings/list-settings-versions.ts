import type { EntityManager } from '@mikro-orm/postgresql';
import type { LabSettings, SettingsVersion } from '#shared/contracts/settings.ts';
import { utc } from '#server/modules/cases/case-rows.ts';
import { withDefaults } from './current-settings.ts';

interface Row {
  version: number;
  before: LabSettings | null;
  after: LabSettings;
  note: string;
  at: string;
  byId: string;
  byName: string;
}

/** Who changed what when, newest first; before the first change stood the defaults. */
export async function listSettingsVersions(
  em: EntityManager,
  { page, pageSize }: { page: number; pageSize: number },
): Promise<{ items: SettingsVersion[]; total: number }> {
  const rows = await em.execute<Row[]>(
    `select s.n as version, s.content as after, b.content as before, s.note,
       ${utc('s.created_at')} as at, a.id as "byId", a.name as "byName"
     from settings_versions s join accounts a on a.id = s.author_id
     left join settings_versions b on b.n = s.n - 1
     order by s.n desc limit ? offset ?`,
    [pageSize, (page - 1) * pageSize],
  );
  const [counted] = await em.execute<{ total: number }[]>(
    'select count(*)::integer as total from settings_versions',
  );
  const items = rows.map(({ version, before, after, note, at, byId, byName }) => ({
    version,
    before: withDefaults(before ?? {}),
    after: withDefaults(after),
    note,
    at,
    by: { id: byId, name: byName },
  }));
  return { items, total: counted?.total ?? 0 };
}
