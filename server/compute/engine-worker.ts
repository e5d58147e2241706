import { ENGINE } from './engine-kinds.ts';
import type { EngineKind, EngineKinds } from './engine-kinds.ts';
import { replyWith } from './message.ts';
import type { Reply } from './message.ts';

/** Entry of every engine thread: one task in, one reply out. */
export default function engineWorker<K extends EngineKind>(task: {
  kind: K;
  input: EngineKinds[K]['input'];
}): Reply {
  return replyWith(() => ENGINE[task.kind](task.input));
}
