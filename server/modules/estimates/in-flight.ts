import { DomainError } from '#shared/errors.ts';

const MOST = 64;
const running = new Map<string, number>();

/** Runs `work` if its person has fewer than 64 computations in flight; otherwise refuses with 429. */
export async function withSlot<T>(personId: string, work: () => Promise<T>): Promise<T> {
  const now = running.get(personId) ?? 0;
  if (now >= MOST) {
    throw new DomainError(
      'tooManyRequests',
      `More than ${MOST} of your computations are in flight; wait for an answer before sending more.`,
      { extra: { retryAfter: 1 } },
    );
  }
  running.set(personId, now + 1);
  try {
    return await work();
  } finally {
    const left = (running.get(personId) ?? 1) - 1;
    if (left > 0) running.set(personId, left);
    else running.delete(personId);
  }
}
