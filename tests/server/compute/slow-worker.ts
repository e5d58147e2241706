import { replyWith } from '#server/compute/message.ts';
import type { Reply, Task } from '#server/compute/message.ts';

/** A thread that spins, dies or fails on demand: what an engine must never do, and what the pool must survive. */
export default function slowWorker({ input }: Task): Reply {
  const wish = input as { spin?: number; die?: boolean; bug?: boolean; echo?: unknown };
  if (wish.die) process.exit(7);
  if (wish.bug) throw new Error('a bug in the engine');
  const end = Date.now() + (wish.spin ?? 0);
  while (Date.now() < end);
  return replyWith(() => wish.echo ?? null);
}
