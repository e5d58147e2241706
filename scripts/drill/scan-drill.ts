import { setTimeout as sleep } from 'node:timers/promises';
import {
  killPostgres,
  killServer,
  killWorker,
  startApplication,
  stopApplication,
} from './application.ts';
import type { Place } from './application.ts';
import { Scanner } from './scanner.ts';

export type ScanBlow = 'worker' | 'postgres' | 'server';

const STRIKE = { worker: killWorker, postgres: killPostgres, server: killServer };

export interface ScanReport {
  points: number;
  method: string;
  blows: Record<ScanBlow, number>;
  /** Points the result lacks, and points of it that a single estimate contradicts. */
  missing: number;
  wrong: number;
  /** How often the start said that it starts the worker again. */
  restarts: number;
  seconds: number;
}

/** A scan that goes on while its worker, PostgreSQL and the server are killed outright, evenly over its course. */
export async function drillScan(
  place: Place,
  plan: { points: number; blows: readonly ScanBlow[] },
): Promise<ScanReport> {
  const application = await startApplication(place);
  try {
    const scanner = await Scanner.signIn(`http://127.0.0.1:${place.port}`);
    const depth = -7;
    const id = await scanner.start(plan.points, depth);
    const begun = Date.now();
    const blows = { worker: 0, postgres: 0, server: 0 };
    for (const [i, blow] of plan.blows.entries()) {
      const due = Math.floor((plan.points * (i + 0.5)) / plan.blows.length);
      await scanner.waitFor(id, ({ done }) => done >= Math.min(due, plan.points - 1));
      while (!STRIKE[blow](place)) await sleep(50);
      blows[blow] += 1;
    }
    await scanner.waitFor(id, ({ state }) => state === 'done');
    const seconds = (Date.now() - begun) / 1000;
    const result = await scanner.readResult(id);
    const numbers = result.values.flat().filter((value) => value !== null);
    return {
      points: plan.points,
      method: scanner.method,
      blows,
      missing: plan.points - numbers.length,
      restarts: application.output().split('The worker ended unexpectedly').length - 1,
      wrong: (await scanner.wrongPoints(result, depth, 25)).length,
      seconds,
    };
  } catch (fault) {
    process.stderr.write(`${application.output()}\n`);
    throw fault;
  } finally {
    await stopApplication(application);
  }
}
