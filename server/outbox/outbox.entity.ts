import { defineEntity } from '@mikro-orm/core';
import type { InferEntity } from '@mikro-orm/core';

export type OutboxPayload = Record<string, unknown>;

/** A message to be delivered after its transaction is there. Append-only. */
export const OutboxMessage = defineEntity({
  name: 'OutboxMessage',
  tableName: 'outbox',
  properties: (p) => ({
    id: p.bigint('string').primary(),
    at: p.datetime(),
    topic: p.text(),
    payload: p.json<OutboxPayload>().columnType('jsonb'),
  }),
});
export type OutboxMessage = InferEntity<typeof OutboxMessage>;

/** An attempt to deliver a message: a row of its own, append-only too. */
export const OutboxDelivery = defineEntity({
  name: 'OutboxDelivery',
  tableName: 'outbox_deliveries',
  properties: (p) => ({
    id: p.bigint('string').primary(),
    outboxId: p.bigint('string'),
    at: p.datetime(),
    outcome: p.text().$type<'delivered' | 'failed'>(),
    detail: p.text().nullable(),
  }),
});
export type OutboxDelivery = InferEntity<typeof OutboxDelivery>;
