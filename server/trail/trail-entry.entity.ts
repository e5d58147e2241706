import { defineEntity } from '@mikro-orm/core';
import type { InferEntity } from '@mikro-orm/core';

export type TrailState = Record<string, unknown>;

/** What was done, by whom, to what. Append-only: the runtime role has no way to change a row. */
export const TrailEntry = defineEntity({
  name: 'TrailEntry',
  tableName: 'trail',
  properties: (p) => ({
    id: p.bigint('string').primary(),
    at: p.datetime(),
    actorId: p.uuid().nullable(),
    actorName: p.text(),
    actorVia: p.text().nullable(),
    action: p.text(),
    subjectType: p.text(),
    subjectId: p.text(),
    before: p.json<TrailState>().columnType('jsonb').nullable(),
    after: p.json<TrailState>().columnType('jsonb').nullable(),
  }),
});
export type TrailEntry = InferEntity<typeof TrailEntry>;
