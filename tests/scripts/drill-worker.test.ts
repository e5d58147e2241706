import { expect, onTestFinished, test } from 'vitest';
import { drillScan } from '#scripts/drill/scan-drill.ts';
import { temporaryPlace } from '#scripts/drill/temporary-place.ts';

/** The small form of `npm run drill:worker`: real processes, a real kill -9 of each while the scan goes on. */
test('a scan survives kill -9 of its worker, of PostgreSQL and of the server, with every point once', async () => {
  const { remove, ...place } = await temporaryPlace();
  onTestFinished(remove);
  const report = await drillScan(place, { points: 400, blows: ['worker', 'postgres', 'server'] });
  expect(report).toMatchObject({
    points: 400,
    blows: { worker: 1, postgres: 1, server: 1 },
    missing: 0,
    wrong: 0,
    restarts: 1,
  });
}, 420_000);
