import { createHash } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/postgresql';
import { z } from 'zod';
import { DomainError } from '#shared/errors.ts';
import { canonicalJson } from '#server/documents/canonical-hash.ts';

/** How long a lost answer can be asked for again. */
const KEPT_DAYS = 7;

/** Idempotency-Key as the OpenAPI document describes it. */
export const SAVE_KEY_HEADER = {
  name: 'Idempotency-Key',
  required: false,
  description:
    'A UUID made anew for each save: a request repeated with it after a lost answer does not save twice.',
};

/** A save under a key of the client's choice: the same key and the same content are one save. */
export interface SaveKey {
  accountId: string;
  key: string;
  fingerprint: string;
}

/** Which version a save made, and the lock of its case then. */
export interface Saved {
  caseId: string;
  n: number;
  lock: number;
}

/** Reads the header Idempotency-Key; `request` is what must be the same for a retry to be one. */
export function saveKeyOf(
  header: string | string[] | undefined,
  accountId: string,
  request: unknown,
): SaveKey | undefined {
  if (header === undefined) return undefined;
  const key = z.uuid().safeParse(header);
  if (!key.success) {
    throw new DomainError(
      'malformed',
      'Idempotency-Key must be one UUID, made anew for each save.',
    );
  }
  const fingerprint = createHash('sha256').update(canonicalJson(request)).digest('hex');
  return { accountId, key: key.data.toLowerCase(), fingerprint };
}

/** What this key saved already; refuses a key that was used for something else. */
export async function findSaved(
  em: EntityManager,
  key: SaveKey | undefined,
): Promise<Saved | undefined> {
  if (!key) return undefined;
  const [row] = await em.execute<(Saved & { fingerprint: string })[]>(
    `select case_id as "caseId", n, lock, fingerprint from save_keys
     where account_id = ? and key = ?`,
    [key.accountId, key.key],
  );
  if (row && row.fingerprint !== key.fingerprint) {
    throw new DomainError(
      'conflict',
      'This Idempotency-Key was used for another save; make a new key for each save.',
    );
  }
  return row && { caseId: row.caseId, n: row.n, lock: row.lock };
}

/**
 * Takes the key within the transaction of its save. A second request with the same key waits for the first one here;
 * false means that the first was kept, so that nothing is left to save.
 */
export async function claimKey(
  em: EntityManager,
  key: SaveKey | undefined,
  { caseId, n, lock }: Saved,
  now: Date,
): Promise<boolean> {
  if (!key) return true;
  await em.execute(
    `delete from save_keys where created_at < ?::timestamptz - make_interval(days => ?)`,
    [now.toISOString(), KEPT_DAYS],
  );
  const taken = await em.execute<unknown[]>(
    `insert into save_keys (account_id, key, fingerprint, case_id, n, lock, created_at)
     values (?, ?, ?, ?, ?, ?, ?) on conflict do nothing returning 1 as taken`,
    [key.accountId, key.key, key.fingerprint, caseId, n, lock, now.toISOString()],
  );
  return taken.length > 0;
}
