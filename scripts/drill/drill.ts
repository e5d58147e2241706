import { setTimeout as sleep } from 'node:timers/promises';
import { canonicalHash } from '#server/documents/canonical-hash.ts';
import {
  killEverything,
  killPostgres,
  killServer,
  startApplication,
  stopApplication,
} from './application.ts';
import type { Application, Place } from './application.ts';
import { Saver } from './saver.ts';
import type { Acknowledged } from './saver.ts';

export type Blow = 'server' | 'postgres' | 'everything';

export interface Plan {
  saves: number;
  /** In this order, spread over the saves. */
  blows: readonly Blow[];
  /** Cases that are saved to at once. */
  lanes: number;
}

export interface Report {
  acknowledged: number;
  cases: number;
  blows: Record<Blow, number>;
  retries: number;
  longestWaitSeconds: number;
  startSeconds: number[];
  /** Acknowledged saves that are gone, or are not what was saved. */
  lost: Acknowledged[];
  /** Versions or cases beyond those acknowledged. */
  doubled: number;
}

/** Blows by the count of saves at which they fall: evenly, each a little late by chance. */
function schedule({ saves, blows }: Plan): Map<number, Blow> {
  const gap = saves / (blows.length + 1);
  return new Map(
    blows.map((blow, index) => [
      Math.max(1, Math.floor(gap * (index + 1) + Math.random() * gap * 0.5)),
      blow,
    ]),
  );
}

async function isKept(saver: Saver, saved: Acknowledged): Promise<boolean> {
  const version = await saver.readVersion(saved.caseId, saved.n);
  if (!version) return false;
  const { document, result, engine, hash } = version;
  return (
    hash === saved.hash &&
    hash === canonicalHash({ document, result, engine }) &&
    document.energy.value === saved.energy
  );
}

async function verify(saver: Saver, lanes: readonly Acknowledged[][]) {
  const lost: Acknowledged[] = [];
  let doubled = 0;
  for (const lane of lanes) {
    for (const saved of lane) if (!(await isKept(saver, saved))) lost.push(saved);
    const first = lane[0];
    if (first) doubled += (await saver.countVersions(first.caseId)) - lane.length;
  }
  const filed = lanes.filter((lane) => lane.length > 0);
  doubled += (await saver.numbers()).length - filed.length;
  return { lost, doubled };
}

/**
 * Saves while the server, PostgreSQL and everything at once are killed outright; then kills everything a last time, starts
 * again and looks whether each acknowledged save is there as it was, once.
 */
export async function drill(place: Place, plan: Plan): Promise<Report> {
  let application: Application = await startApplication(place);
  const startSeconds = [application.milliseconds / 1000];
  const restart = async () => {
    application = await startApplication(place);
    startSeconds.push(application.milliseconds / 1000);
  };
  try {
    const saver = await Saver.signIn(`http://127.0.0.1:${place.port}`);
    const falls = schedule(plan);
    const blows: Report['blows'] = { server: 0, postgres: 0, everything: 0 };
    let begun = 0;

    const strike = async (blow: Blow): Promise<void> => {
      // A moment later, so that it falls into saves under way.
      await sleep(Math.random() * 30);
      if (blow === 'server') blows.server += Number(killServer(place));
      else if (blow === 'postgres') blows.postgres += Number(killPostgres(place));
      else {
        blows.everything += 1;
        await killEverything(application, place);
        await restart();
      }
    };
    const runLane = async (lane: Acknowledged[]): Promise<void> => {
      while (begun < plan.saves) {
        begun += 1;
        const blow = falls.get(begun);
        const falling = blow ? strike(blow) : undefined;
        lane.push(await saver.save(100 + begun, lane.at(-1)));
        await falling;
      }
    };
    const lanes = Array.from({ length: plan.lanes }, (): Acknowledged[] => []);
    await Promise.all(lanes.map(runLane));

    await killEverything(application, place);
    await restart();
    const { lost, doubled } = await verify(saver, lanes);
    return {
      acknowledged: lanes.flat().length,
      cases: lanes.filter((lane) => lane.length > 0).length,
      blows: { ...blows, everything: blows.everything + 1 },
      retries: saver.retries,
      longestWaitSeconds: saver.longestWait / 1000,
      startSeconds,
      lost,
      doubled,
    };
  } catch (fault) {
    process.stderr.write(`${application.output()}\n`);
    throw fault;
  } finally {
    await stopApplication(application);
  }
}
