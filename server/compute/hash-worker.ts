import { compareSync, hashSync } from 'bcryptjs';

export type HashTask =
  { password: string; cost: number } | { password: string; passwordHash: string };

/** Entry of the hashing thread: a new hash, or whether a password has this one. */
export default function hashWorker(task: HashTask): string | boolean {
  if ('cost' in task) return hashSync(task.password, task.cost);
  return compareSync(task.password, task.passwordHash);
}
