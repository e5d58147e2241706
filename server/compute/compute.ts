import { availableParallelism } from 'node:os';
import { Piscina } from 'piscina';
import { DomainError } from '#shared/errors.ts';
import type { EngineKind, EngineKinds } from './engine-kinds.ts';
import { outputOf } from './message.ts';
import type { Reply, Task } from './message.ts';
import { workerFileOf } from './worker-file.ts';
import type { WorkerFile } from './worker-file.ts';

export interface ComputeOptions {
  /** Gives the work up; the caller hears of it at once. */
  signal?: AbortSignal;
  /** Milliseconds from the call, waiting included; past them the thread is ended. Default 10,000. */
  deadline?: number;
}

/** The one door to the engine. */
export type Compute = <K extends EngineKind>(
  kind: K,
  input: EngineKinds[K]['input'],
  options?: ComputeOptions,
) => Promise<EngineKinds[K]['output']>;

export interface ComputePool {
  compute: Compute;
  /** Ends every thread; what was running is refused. */
  close: () => Promise<void>;
}

export interface PoolOptions {
  threads?: number;
  /** Tasks that may wait or run at once before further ones are refused. */
  capacity?: number;
  worker?: WorkerFile;
}

const DEFAULT_DEADLINE = 10_000;
const DEFAULT_CAPACITY = 512;
/** An abandoned task is mostly done sooner than a new thread would start: it is let finish that long. */
const GRACE = 500;

/**
 * Worker threads behind `compute(kind, input, {signal, deadline})`: nothing is computed on the event loop.
 * Past its deadline a thread is ended and the caller gets DomainError('tooMuchWork'); a thread that died is replaced.
 */
export function createCompute(pool: PoolOptions = {}): ComputePool {
  const { filename, execArgv } = pool.worker ?? workerFileOf('engine-worker');
  const capacity = pool.capacity ?? DEFAULT_CAPACITY;
  const threads = new Piscina({
    filename,
    execArgv,
    minThreads: 1,
    maxThreads: Math.max(1, pool.threads ?? availableParallelism()),
    idleTimeout: 60_000,
  });
  // A thread that dies idle is replaced by the pool; without a listener its error would end the process.
  threads.on('error', () => undefined);
  let inFlight = 0;
  let closing = false;

  async function run(task: Task, options: ComputeOptions): Promise<Reply> {
    if (closing) throw new DomainError('unavailable', 'The server is stopping; try again later.');
    if (options.signal?.aborted) throw abandoned();
    if (inFlight >= capacity) {
      throw new DomainError(
        'unavailable',
        'The server has as much to compute as it can hold; try again in a moment.',
      );
    }
    inFlight += 1;
    const end = new AbortController();
    try {
      const running = threads.run(task, { signal: end.signal }) as Promise<Reply>;
      return await within(running, end, options);
    } catch (error) {
      if (closing) throw new DomainError('unavailable', 'The server is stopping; try again later.');
      throw error;
    } finally {
      inFlight -= 1;
    }
  }

  return {
    async compute<K extends EngineKind>(
      kind: K,
      input: EngineKinds[K]['input'],
      options: ComputeOptions = {},
    ) {
      const reply = await run({ kind, input }, options);
      return outputOf(reply) as EngineKinds[K]['output'];
    },
    async close() {
      closing = true;
      await threads.destroy();
    },
  };
}

function abandoned(): DomainError {
  return new DomainError('tooMuchWork', 'The computation was given up before it was done.');
}

/** Settles with `running`, or earlier with a refusal when the deadline passes or the caller gives up; ends the thread in both cases. */
function within(
  running: Promise<Reply>,
  end: AbortController,
  { signal, deadline = DEFAULT_DEADLINE }: ComputeOptions,
): Promise<Reply> {
  return new Promise((resolve, reject) => {
    const onDeadline = () => {
      reject(
        new DomainError(
          'tooMuchWork',
          `The computation was stopped after ${deadline / 1000} s. Ask for fewer angles, fewer terms, or a smaller product of wave number and range.`,
        ),
      );
      end.abort();
    };
    const timer = setTimeout(onDeadline, deadline);
    let grace: NodeJS.Timeout | undefined;
    const onAbort = () => {
      clearTimeout(timer);
      grace = setTimeout(() => end.abort(), Math.min(GRACE, deadline));
      reject(abandoned());
    };
    const done = () => {
      clearTimeout(timer);
      clearTimeout(grace);
      signal?.removeEventListener('abort', onAbort);
    };
    signal?.addEventListener('abort', onAbort, { once: true });
    running.finally(done).then(resolve, reject);
  });
}
