import process from 'node:process';
import { drillScan } from './drill/scan-drill.ts';
import { measurePace } from './drill/scan-pace.ts';
import { temporaryPlace } from './drill/temporary-place.ts';

// npm run drill:worker [-- POINTS]: the pace of a scan with one worker and with two, then a scan that goes on while the worker,
// PostgreSQL and the server are killed outright, on throw-away installations.
const points = Number(process.argv[2] ?? 10_000);

async function inPlace<T>(work: (place: { dataDir: string; port: number }) => Promise<T>) {
  const { remove, ...place } = await temporaryPlace();
  try {
    return await work(place);
  } finally {
    remove();
  }
}

console.log(JSON.stringify(await inPlace((place) => measurePace(place, points)), null, 2));
const report = await inPlace((place) =>
  drillScan(place, {
    points,
    blows: ['worker', 'postgres', 'worker', 'server', 'worker', 'postgres'],
  }),
);
console.log(JSON.stringify(report, null, 2));
process.exitCode = report.missing === 0 && report.wrong === 0 ? 0 : 1;
