import { createHash } from 'node:crypto';
import type { EntityManager } from '@mikro-orm/postgresql';
import { DomainError } from '#shared/errors.ts';
import { SignInFailure } from './session.entity.ts';

/** Failures allowed within the window; kept in the database, so that several servers count together. */
const WINDOW_MINUTES = 15;
const LIMITS = { accountFromAddress: 10, account: 30, address: 50 };

export interface Attempt {
  email: string;
  address: string;
}

function keyOf(email: string): string {
  return createHash('sha256').update(email.trim().toLowerCase()).digest('hex');
}

interface Counts {
  pair: number;
  account: number;
  address: number;
  oldest_pair: string | null;
  oldest_account: string | null;
  oldest_address: string | null;
}

/** Refuses (429) an attempt after too many failures of this account or from this address. */
export async function checkThrottle(em: EntityManager, attempt: Attempt, now: Date): Promise<void> {
  const since = new Date(now.getTime() - WINDOW_MINUTES * 60_000);
  const key = keyOf(attempt.email);
  const [counts] = await em.getConnection().execute<Counts[]>(
    `select count(*) filter (where account_key = ? and address = ?)::int as pair,
            count(*) filter (where account_key = ?)::int as account,
            count(*) filter (where address = ?)::int as address,
            min(at) filter (where account_key = ? and address = ?)::text as oldest_pair,
            min(at) filter (where account_key = ?)::text as oldest_account,
            min(at) filter (where address = ?)::text as oldest_address
       from sign_in_failures where at > ? and (account_key = ? or address = ?)`,
    [
      ...[key, attempt.address, key, attempt.address],
      ...[key, attempt.address, key, attempt.address],
      ...[since, key, attempt.address],
    ],
  );
  if (!counts) return;
  const oldest =
    (counts.pair >= LIMITS.accountFromAddress && counts.oldest_pair) ||
    (counts.account >= LIMITS.account && counts.oldest_account) ||
    (counts.address >= LIMITS.address && counts.oldest_address);
  if (!oldest) return;
  const free = new Date(oldest).getTime() + WINDOW_MINUTES * 60_000;
  const seconds = Math.max(1, Math.ceil((free - now.getTime()) / 1000));
  throw new DomainError(
    'tooManyRequests',
    `Too many failed sign-ins; try again in ${Math.ceil(seconds / 60)} min.`,
    { extra: { retryAfter: seconds } },
  );
}

export async function recordFailure(em: EntityManager, attempt: Attempt, now: Date): Promise<void> {
  const accountKey = keyOf(attempt.email);
  await em.insert(SignInFailure, { accountKey, address: attempt.address, at: now });
}

/** Forgets what no longer counts, and the failures of this account: from this address, or from all. */
export async function forgiveFailures(
  em: EntityManager,
  { email, address }: { email: string; address?: string },
  now: Date,
): Promise<void> {
  const since = new Date(now.getTime() - WINDOW_MINUTES * 60_000);
  await em.nativeDelete(SignInFailure, { at: { $lt: since } });
  const accountKey = keyOf(email);
  await em.nativeDelete(SignInFailure, { accountKey, ...(address !== undefined && { address }) });
}
