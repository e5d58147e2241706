import type { z } from 'zod';
import type { Compute } from '#server/compute/compute.ts';

export interface PartTools {
  /** The one computing thread of this worker. */
  compute: Compute;
  /** Aborts when the job is cancelled, the share is lost or the worker stops. */
  signal: AbortSignal;
}

/** A job as a worker holds it. Values of parts are plain JSON. */
export interface OpenJob {
  /** What a part is made of, hashed; a part of the same content is taken from wherever it was computed before. */
  contentHash?: (part: number) => string;
  part: (part: number, tools: PartTools) => Promise<unknown>;
}

interface KindSpec<S extends z.ZodType> {
  /** Validates what was stored, each time a worker takes a share of it. */
  input: S;
  /** Parts the work falls into: what progress counts and what is kept piece by piece. */
  total: (input: z.output<S>) => number;
  /** Parts one worker holds at a time at most. */
  shareOf?: number;
  open: (input: z.output<S>) => OpenJob;
  /** Made of all parts in their order, once, after the last of them; null or absent where the parts are the result. */
  finish?: (input: z.output<S>, parts: unknown[], tools: PartTools) => Promise<unknown>;
}

/** A kind of job as the queue sees it, whatever its input is. */
export interface JobKind {
  total: (input: unknown) => number;
  shareOf: number;
  open: (input: unknown) => OpenJob;
  finish: ((input: unknown, parts: unknown[], tools: PartTools) => Promise<unknown>) | undefined;
}

const SHARE_OF = 250;

export function defineKind<S extends z.ZodType>(spec: KindSpec<S>): JobKind {
  const { finish } = spec;
  return {
    total: (input) => spec.total(spec.input.parse(input)),
    shareOf: spec.shareOf ?? SHARE_OF,
    open: (input) => spec.open(spec.input.parse(input)),
    finish: finish && ((input, parts, tools) => finish(spec.input.parse(input), parts, tools)),
  };
}
