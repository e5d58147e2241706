import type { EntityManager } from '@mikro-orm/postgresql';
import { TrailEntry } from './trail-entry.entity.ts';
import type { TrailState } from './trail-entry.entity.ts';

/** Who did it: an actor of a request, or a command of the machine's owner, which has a name alone. */
export interface TrailActor {
  id?: string;
  name: string;
  credential?: { kind: 'session' } | { kind: 'token'; tokenId: string };
}

export interface TrailRecord {
  actor: TrailActor;
  /** A verb in dotted form: case.create, account.deactivate. */
  action: string;
  subject: { type: string; id: string };
  before?: TrailState;
  after?: TrailState;
  now: Date;
}

function via(actor: TrailActor): string {
  if (!actor.credential) return 'command';
  return actor.credential.kind === 'token' ? `token:${actor.credential.tokenId}` : 'session';
}

/**
 * Writes an entry of the trail in the transaction of the change it tells of: both are there, or neither.
 * Secrets never belong into `before` and `after`.
 */
export function recordTrail(em: EntityManager, record: TrailRecord): void {
  if (!em.isInTransaction()) {
    throw new Error(`The trail entry ${record.action} was written outside a transaction.`);
  }
  em.create(
    TrailEntry,
    {
      at: record.now,
      actorId: record.actor.id ?? null,
      actorName: record.actor.name,
      actorVia: via(record.actor),
      action: record.action,
      subjectType: record.subject.type,
      subjectId: record.subject.id,
      before: record.before ?? null,
      after: record.after ?? null,
    },
    { persist: true },
  );
}
