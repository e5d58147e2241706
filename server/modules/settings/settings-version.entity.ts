import { defineEntity } from '@mikro-orm/core';
import type { InferEntity } from '@mikro-orm/core';
import type { LabSettings } from '#shared/contracts/settings.ts';

/** The settings as they were set once, whole; the newest counts. Append-only. */
export const SettingsVersion = defineEntity({
  name: 'SettingsVersion',
  tableName: 'settings_versions',
  properties: (p) => ({
    n: p.integer().primary(),
    content: p.json<LabSettings>().columnType('jsonb'),
    authorId: p.uuid(),
    note: p.text(),
    createdAt: p.datetime(),
  }),
});
export type SettingsVersion = InferEntity<typeof SettingsVersion>;
