import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import process from 'node:process';
import { ROOT } from '#scripts/lib/settings.mjs';
import { startApplication, stopApplication } from './application.ts';
import type { Place } from './application.ts';
import { Scanner } from './scanner.ts';

async function paceOf(scanner: Scanner, points: number, depth: number): Promise<number> {
  const id = await scanner.start(points, depth);
  const { startedAt, finishedAt } = await scanner.waitFor(id, ({ state }) => state === 'done');
  return points / ((Date.parse(finishedAt ?? '') - Date.parse(startedAt ?? '')) / 1000);
}

/** One more worker, as `npm run worker` starts it. */
async function withSecondWorker<T>({ dataDir }: Place, scanner: Scanner, work: () => Promise<T>) {
  const child = spawn(process.execPath, [join(ROOT, 'scripts/worker.mjs')], {
    env: { ...process.env, DATA_DIR: dataDir, DATABASE_URL: undefined },
    stdio: 'ignore',
  });
  try {
    const probe = await scanner.start(1, -0.5);
    await scanner.waitFor(probe, ({ workers, state }) => workers === 2 && state === 'done');
    return await work();
  } finally {
    const ended = once(child, 'exit');
    child.kill('SIGTERM');
    await ended;
  }
}

/** Points per second of the same scan with one worker and with two, each scan of a depth of its own. */
export async function measurePace(place: Place, points: number) {
  const application = await startApplication(place);
  try {
    const scanner = await Scanner.signIn(`http://127.0.0.1:${place.port}`);
    await paceOf(scanner, Math.ceil(points / 20), -1);
    const one = await paceOf(scanner, points, -2);
    const two = await withSecondWorker(place, scanner, () => paceOf(scanner, points, -3));
    return { method: scanner.method, points, oneWorker: one, twoWorkers: two, ratio: two / one };
  } finally {
    await stopApplication(application);
  }
}
