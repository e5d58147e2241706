import type { EntityManager } from '@mikro-orm/postgresql';
import { OutboxMessage } from './outbox.entity.ts';
import type { OutboxPayload } from './outbox.entity.ts';

/** Leaves a message in the transaction of the change it tells of, so that none is sent for what never happened. */
export function enqueue(
  em: EntityManager,
  message: { topic: string; payload: OutboxPayload; now: Date },
): void {
  if (!em.isInTransaction()) {
    throw new Error(`The message ${message.topic} was left outside a transaction.`);
  }
  const { topic, payload, now } = message;
  em.create(OutboxMessage, { at: now, topic, payload }, { persist: true });
}
