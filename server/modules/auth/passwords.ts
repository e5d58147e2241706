import { bcryptHash, bcryptMatches } from '#server/compute/hashing.ts';
import { DomainError } from '#shared/errors.ts';

/** bcrypt reads no further; a longer password would be cut silently, so it never matches. */
const MAX_BYTES = 72;
const MAX_WAITING = 100;

let waiting = 0;
let last: Promise<unknown> = Promise.resolve();

/**
 * One at a time: hashing is heavy by design, and the count of failures must be read after the attempt before
 * it was written, or a burst of guesses would slip through together.
 */
export async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (waiting >= MAX_WAITING) {
    throw new DomainError(
      'tooManyRequests',
      'Too many people sign in at once; try again shortly.',
      {
        extra: { retryAfter: 10 },
      },
    );
  }
  waiting += 1;
  const mine = last.then(work);
  last = mine.catch(() => undefined);
  try {
    return await mine;
  } finally {
    waiting -= 1;
  }
}

export function hashPassword(password: string, cost: number): Promise<string> {
  return bcryptHash(password, cost);
}

const dummies = new Map<number, Promise<string>>();

function dummyHash(cost: number): Promise<string> {
  const known = dummies.get(cost) ?? bcryptHash('nobody has this password', cost);
  dummies.set(cost, known);
  return known;
}

/** The same work whether the account exists or not, so that time does not tell who has one. */
export async function passwordMatches(
  password: string,
  passwordHash: string | undefined,
  cost: number,
): Promise<boolean> {
  const fits = new TextEncoder().encode(password).length <= MAX_BYTES;
  const matches = await bcryptMatches(password, passwordHash ?? (await dummyHash(cost)));
  return matches && fits && passwordHash !== undefined;
}
