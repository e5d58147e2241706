import { expect, onTestFinished, test } from 'vitest';
import { drill } from '#scripts/drill/drill.ts';
import { temporaryPlace } from '#scripts/drill/temporary-place.ts';

/** The small form of `npm run drill`: real processes, a real kill -9 of each, and one of all together. */
test('acknowledged saves survive kill -9 of the server, of PostgreSQL and of everything', async () => {
  const { remove, ...place } = await temporaryPlace();
  onTestFinished(remove);
  const report = await drill(place, { saves: 10, blows: ['server', 'postgres'], lanes: 2 });
  expect(report).toMatchObject({
    acknowledged: 10,
    cases: 2,
    blows: { server: 1, postgres: 1, everything: 1 },
    lost: [],
    doubled: 0,
  });
  // A blow that nobody noticed would prove nothing.
  expect(report.retries).toBeGreaterThan(0);
}, 420_000);
