import type { EntityManager } from '@mikro-orm/postgresql';
import { DEFAULT_SETTINGS } from '#shared/contracts/settings.ts';
import type { LabSettings, Settings } from '#shared/contracts/settings.ts';
import { utc } from '#server/modules/cases/case-rows.ts';

interface Row {
  version: number;
  content: LabSettings;
  note: string;
  at: string;
  byId: string;
  byName: string;
}

/** A setting that is younger than the row counts as its default. */
export function withDefaults(content: Partial<LabSettings>): LabSettings {
  return { verdict: content.verdict ?? DEFAULT_SETTINGS.verdict };
}

/** What holds in the lab now, with who set it: one row by its primary key, so that nothing need be remembered. */
export async function readSettings({ em }: { em: EntityManager }): Promise<Settings> {
  const [row] = await em.execute<Row[]>(
    `select s.n as version, s.content, s.note, ${utc('s.created_at')} as at,
       a.id as "byId", a.name as "byName"
     from settings_versions s join accounts a on a.id = s.author_id order by s.n desc limit 1`,
  );
  const defaults = DEFAULT_SETTINGS;
  if (!row) return { ...defaults, version: 0, changed: null, defaults };
  const { version, content, note, at, byId, byName } = row;
  return {
    ...withDefaults(content),
    version,
    changed: { at, note, by: { id: byId, name: byName } },
    defaults,
  };
}

/** The settings alone, for whoever computes with them. */
export async function currentSettings({ em }: { em: EntityManager }): Promise<LabSettings> {
  const { verdict } = await readSettings({ em });
  return { verdict };
}
