import process from 'node:process';
import { drill } from './drill/drill.ts';
import type { Blow } from './drill/drill.ts';
import { temporaryPlace } from './drill/temporary-place.ts';

// npm run drill: 200 saves on a throw-away installation while its parts are killed outright. A start mends itself at most
// six times in two minutes, so the blows stay below that; each blow on everything is followed by a start of its own.
const blows: Blow[] = [
  ...(['server', 'postgres', 'server', 'postgres', 'everything'] as const),
  ...(['postgres', 'server', 'server', 'postgres', 'everything'] as const),
];
const { remove, ...place } = await temporaryPlace();
const begun = Date.now();
try {
  const { lost, startSeconds, ...report } = await drill(place, { saves: 200, blows, lanes: 4 });
  const seconds = (Date.now() - begun) / 1000;
  console.log(JSON.stringify({ ...report, lost: lost.length, startSeconds, seconds }, null, 2));
  if (lost.length > 0) console.log('Lost:', lost);
  process.exitCode = lost.length === 0 && report.doubled === 0 ? 0 : 1;
} finally {
  remove();
}
