import { getRounds } from 'bcryptjs';
import { Piscina } from 'piscina';
import hashWorker from './hash-worker.ts';
import type { HashTask } from './hash-worker.ts';
import { workerFileOf } from './worker-file.ts';

/** Below this cost a hash takes a few milliseconds: less than a thread takes to begin. */
const WORTH_A_THREAD = 8;
const IDLE_MILLISECONDS = 60_000;

let thread: Piscina | undefined;

/** One thread, apart from those of the engine: whoever signs in does not wait for a computation. It ends when idle and holds no process open. */
function hashingThread(): Piscina {
  thread ??= new Piscina({
    ...workerFileOf('hash-worker'),
    minThreads: 0,
    maxThreads: 1,
    idleTimeout: IDLE_MILLISECONDS,
  }).on('error', () => undefined);
  return thread;
}

const costOf = (task: HashTask): number =>
  'cost' in task ? task.cost : getRounds(task.passwordHash);

/** bcrypt off the event loop: a quarter of a second of each sign-in is work by design. */
async function run(task: HashTask): Promise<unknown> {
  return costOf(task) < WORTH_A_THREAD ? hashWorker(task) : hashingThread().run(task);
}

export async function bcryptHash(password: string, cost: number): Promise<string> {
  return String(await run({ password, cost }));
}

export async function bcryptMatches(password: string, passwordHash: string): Promise<boolean> {
  return (await run({ password, passwordHash })) === true;
}
