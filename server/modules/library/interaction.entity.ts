import { defineEntity } from '@mikro-orm/core';
import type { InferEntity } from '@mikro-orm/core';
import type { InteractionContent, InteractionStatus } from '#shared/contracts/library.ts';

/** What an interaction of the library is now; name and tags repeat those of its newest version for lists. */
export const Interaction = defineEntity({
  name: 'Interaction',
  tableName: 'interactions',
  properties: (p) => ({
    id: p.uuid().primary(),
    name: p.text(),
    tags: p.array().columnType('text[]').$type<string[]>(),
    ownerId: p.uuid(),
    newestVersion: p.integer(),
    searchText: p.text(),
    createdAt: p.datetime(),
    updatedAt: p.datetime(),
    /** Raised by every change; the ETag. */
    lock: p.integer().version(),
  }),
});
export type Interaction = InferEntity<typeof Interaction>;

/** One published state, and the hash over it. Append-only: cases cite it by its number. */
export const InteractionVersion = defineEntity({
  name: 'InteractionVersion',
  tableName: 'interaction_versions',
  properties: (p) => ({
    id: p.uuid().primary(),
    interactionId: p.uuid(),
    n: p.integer(),
    content: p.json<InteractionContent>().columnType('jsonb'),
    hash: p.text(),
    authorId: p.uuid(),
    note: p.text(),
    createdAt: p.datetime(),
  }),
});
export type InteractionVersion = InferEntity<typeof InteractionVersion>;

/** Published or retired; the newest row is the one that counts. Append-only. */
export const InteractionStatusRow = defineEntity({
  name: 'InteractionStatusRow',
  tableName: 'interaction_statuses',
  properties: (p) => ({
    id: p.bigint('string').primary(),
    interactionId: p.uuid(),
    status: p.text().$type<InteractionStatus>(),
    actorId: p.uuid(),
    reason: p.text(),
    createdAt: p.datetime(),
  }),
});
export type InteractionStatusRow = InferEntity<typeof InteractionStatusRow>;
