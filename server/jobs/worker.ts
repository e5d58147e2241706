import { randomUUID } from 'node:crypto';
import { hostname } from 'node:os';
import { setTimeout as sleep } from 'node:timers/promises';
import type { MikroORM } from '@mikro-orm/postgresql';
import type { Logger } from 'pino';
import type { Compute } from '#server/compute/compute.ts';
import { isDatabaseAway } from '#server/db/faults.ts';
import { VERSION } from '#server/version.ts';
import { sayFarewell, showLife } from './living-workers.ts';
import { runShare } from './run-share.ts';
import { claimShare } from './shares.ts';
import { QUEUE, bossDatabase, openBoss } from './wake-up.ts';

const LOOK_MILLISECONDS = 300;
/** Without a wake-up: for further shares of a running job, and for those of workers that died. */
const SWEEP_MILLISECONDS = 1_000;
const LIFE_MILLISECONDS = 1_000;

export interface WorkerDeps {
  orm: MikroORM;
  /** One computing thread. */
  compute: Compute;
  logger: Logger;
}

/** Runs until `stopping` aborts; resolves when the share in hand is given back and the worker has said farewell. */
export async function runWorker(deps: WorkerDeps, stopping: AbortSignal): Promise<void> {
  const { orm, compute } = deps;
  const id = randomUUID();
  const logger = deps.logger.child({ worker: id });
  const em = () => orm.em.fork();
  const boss = openBoss(bossDatabase(em), { supervise: true });
  boss.on('error', (err) => {
    logger.warn({ err }, 'the queue could not be looked after');
  });

  const patiently = async <T>(what: string, work: () => Promise<T>): Promise<T | undefined> => {
    try {
      return await work();
    } catch (err) {
      const level = isDatabaseAway(err) ? 'warn' : 'error';
      logger[level]({ err }, `${what} did not succeed`);
      await sleep(500);
      return undefined;
    }
  };
  const pause = (milliseconds: number) =>
    sleep(milliseconds, undefined, { signal: stopping }).catch(() => undefined);

  const card = { id, machine: hostname(), pid: process.pid, version: VERSION };
  const live = () => patiently('a sign of life', () => showLife(em(), card));
  await live();
  const life = setInterval(() => void live(), LIFE_MILLISECONDS);

  let isSupervised = false;
  const supervise = async () => {
    if (isSupervised) return;
    await patiently('opening the queue', async () => {
      await boss.start();
      isSupervised = true;
    });
  };

  /** Whether something woke this worker; the wake-up is used up by that, so that nothing of a dead worker's stays behind. */
  const isWoken = async () => {
    const [wakeUp] = await boss.fetch(QUEUE);
    if (wakeUp) await patiently('ending a wake-up', () => boss.deleteJob(QUEUE, wakeUp.id));
    return wakeUp !== undefined;
  };
  const workOff = async () => {
    for (;;) {
      if (stopping.aborted) return;
      const share = await patiently('taking a share', () => claimShare(em(), id));
      if (!share) return;
      await runShare(share, { em, compute, logger, stopping });
    }
  };

  let sweptAt = 0;
  try {
    while (!stopping.aborted) {
      await supervise();
      if ((await isWoken()) || Date.now() - sweptAt >= SWEEP_MILLISECONDS) {
        await patiently('the work', workOff);
        sweptAt = Date.now();
      }
      await pause(LOOK_MILLISECONDS);
    }
  } finally {
    clearInterval(life);
    if (isSupervised) await boss.stop({ graceful: false });
    await patiently('the farewell', () => sayFarewell(em(), id));
  }
}
