import { setTimeout as sleep } from 'node:timers/promises';
import type { EntityManager } from '@mikro-orm/postgresql';
import type { Logger } from 'pino';
import type { Compute } from '#server/compute/compute.ts';
import { isDatabaseAway } from '#server/db/faults.ts';
import { keepParts } from './shares.ts';
import type { Part, Share } from './shares.ts';

const KEEP_EVERY_MILLISECONDS = 400;

export interface ShareContext {
  em: () => EntityManager;
  compute: Compute;
  logger: Logger;
  /** Aborts when the worker is to stop. */
  stopping: AbortSignal;
}

/** Why work on a share ends before its end. */
export class LetGo extends Error {
  override readonly name = 'LetGo';
}

/** Tries again while the database is away; a worker that is to stop gives up. */
export async function persistently<T>(work: () => Promise<T>, { stopping, logger }: ShareContext) {
  for (let tries = 0; ; tries += 1) {
    try {
      return await work();
    } catch (fault) {
      if (!isDatabaseAway(fault) || stopping.aborted) throw fault;
      if (tries === 0) logger.warn({ err: fault }, 'the database is away; waiting for it');
      await sleep(500);
    }
  }
}

/** Collects parts and keeps them every so often: not each by itself, and never many unkept. */
export class Keeper {
  private waiting: Part[] = [];
  private keptAt = Date.now();

  constructor(
    private readonly share: Share,
    private readonly context: ShareContext,
  ) {}

  async add(part: Part): Promise<void> {
    this.waiting.push(part);
    if (Date.now() - this.keptAt >= KEEP_EVERY_MILLISECONDS) await this.keep();
  }

  async keep(end?: { finished: true; result?: unknown }): Promise<void> {
    const { share, context, waiting } = this;
    if (waiting.length === 0 && !end) return;
    // Written twice after a lost answer, a part is still there once: its number is its key.
    const kept = await persistently(() => keepParts(context.em(), share, waiting, end), context);
    if (!kept) throw new LetGo('the share is another worker’s, or its job no longer runs');
    this.waiting = [];
    this.keptAt = Date.now();
  }
}
