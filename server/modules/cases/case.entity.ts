import { defineEntity } from '@mikro-orm/core';
import type { InferEntity } from '@mikro-orm/core';
import type { Summary } from '#server/documents/summarise.ts';

/** What a case is now; its history is in its versions. Title, tags and summary repeat the newest one for lists. */
export const Case = defineEntity({
  name: 'Case',
  tableName: 'cases',
  properties: (p) => ({
    id: p.uuid().primary(),
    number: p.integer().unique(),
    title: p.text(),
    tags: p.array().columnType('text[]').$type<string[]>(),
    ownerId: p.uuid(),
    campaignId: p.uuid().nullable(),
    newestVersion: p.integer(),
    summary: p.json<Summary>().columnType('jsonb'),
    searchText: p.text(),
    createdAt: p.datetime(),
    updatedAt: p.datetime(),
    /** Raised by every change; the ETag. */
    lock: p.integer().version(),
  }),
});
export type Case = InferEntity<typeof Case>;
