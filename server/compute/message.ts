import type { ErrorCode } from '#shared/errors.ts';
import { DomainError } from '#shared/errors.ts';

/** What travels to a thread. */
export interface Task {
  kind: string;
  input: unknown;
}

/** What comes back: a refusal is an answer, for an error loses its fields between threads. */
export type Reply =
  | { ok: true; output: unknown }
  | { ok: false; code: ErrorCode; message: string; details: DomainError['details'] };

/** Runs `work` and turns a refusal into a reply; any other exception is a bug and stays one. */
export function replyWith(work: () => unknown): Reply {
  try {
    return { ok: true, output: work() };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    const { code, message, details } = error;
    return { ok: false, code, message, details };
  }
}

/** The output, or the refusal thrown again on this side. */
export function outputOf(reply: Reply): unknown {
  if (reply.ok) return reply.output;
  throw new DomainError(reply.code, reply.message, reply.details);
}
