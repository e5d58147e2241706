import { compareSync, getRounds, hashSync } from 'bcryptjs';
import { expect, test } from 'vitest';
import { bcryptHash, bcryptMatches } from '#server/compute/hashing.ts';

/** Worth a thread, and not more than this test needs. */
const COST = 10;

test.each([4, COST])('hashes at cost %d are those of bcrypt, whoever makes them', async (cost) => {
  const made = await bcryptHash('correct horse', cost);
  expect(getRounds(made)).toBe(cost);
  expect(compareSync('correct horse', made)).toBe(true);
  expect(compareSync('wrong horse', made)).toBe(false);
  const other = hashSync('correct horse', cost);
  expect(await bcryptMatches('correct horse', other)).toBe(true);
  expect(await bcryptMatches('wrong horse', other)).toBe(false);
});

test('what is no hash matches nothing or is refused, and the next one is answered', async () => {
  expect(await bcryptMatches('a password', '$2b$10$too short')).toBe(false);
  const damaged = hashSync('a password', COST).replace('$2', '$9');
  await expect(bcryptMatches('a password', damaged)).rejects.toThrow(/salt/);
  expect(await bcryptMatches('a password', hashSync('a password', COST))).toBe(true);
});

test('the event loop goes on while a password is hashed', async () => {
  await bcryptHash('the thread is there before anything is counted', COST);
  let turns = 0;
  const count = () => {
    turns += 1;
    turning = setImmediate(count);
  };
  let turning = setImmediate(count);
  await bcryptHash('while the loop turns', COST);
  clearImmediate(turning);
  // bcryptjs by itself would give the loop back a few times only.
  expect(turns).toBeGreaterThan(100);
});
