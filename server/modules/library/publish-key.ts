import type { EntityManager } from '@mikro-orm/postgresql';
import { DomainError } from '#shared/errors.ts';
import type { SaveKey } from '#server/modules/cases/save-key.ts';

const KEPT_DAYS = 7;

/** Which version a publication made, and the lock of its interaction then. */
export interface Published {
  interactionId: string;
  n: number;
  lock: number;
}

/** What this key published already; refuses a key that was used for something else. */
export async function findPublished(
  em: EntityManager,
  key: SaveKey | undefined,
): Promise<Published | undefined> {
  if (!key) return undefined;
  const [row] = await em.execute<(Published & { fingerprint: string })[]>(
    `select interaction_id as "interactionId", n, lock, fingerprint from publish_keys
     where account_id = ? and key = ?`,
    [key.accountId, key.key],
  );
  if (row && row.fingerprint !== key.fingerprint) {
    throw new DomainError(
      'conflict',
      'This Idempotency-Key was used for another publication; make a new key for each.',
    );
  }
  return row && { interactionId: row.interactionId, n: row.n, lock: row.lock };
}

/** Takes the key within the transaction of its publication; false where another request with it was faster. */
export async function claimPublishKey(
  em: EntityManager,
  key: SaveKey | undefined,
  { interactionId, n, lock }: Published,
  now: Date,
): Promise<boolean> {
  if (!key) return true;
  await em.execute(
    `delete from publish_keys where created_at < ?::timestamptz - make_interval(days => ?)`,
    [now.toISOString(), KEPT_DAYS],
  );
  const taken = await em.execute<unknown[]>(
    `insert into publish_keys (account_id, key, fingerprint, interaction_id, n, lock, created_at)
     values (?, ?, ?, ?, ?, ?, ?) on conflict do nothing returning 1 as taken`,
    [key.accountId, key.key, key.fingerprint, interactionId, n, lock, now.toISOString()],
  );
  return taken.length > 0;
}
