import type { EntityManager } from '@mikro-orm/postgresql';
import type { Logger } from 'pino';
import type { Compute } from '#server/compute/compute.ts';
import type { AppConfig } from '#server/config.ts';
import type { Actor } from './actor.ts';

/** What every handler may use besides its parsed input. */
export interface RequestContext {
  /** Forked for this request alone. */
  em: EntityManager;
  actor: Actor | null;
  now: Date;
  /** Aborts when the client goes away. */
  signal: AbortSignal;
  compute: Compute;
  config: AppConfig;
  log: Logger;
  requestId: string;
  /** The address the request came from, and its headers, for the few that must see them. */
  address: string;
  headers: Readonly<Record<string, string | string[] | undefined>>;
  ifMatch: string | undefined;
  /** Sets a header of the answer, such as ETag. */
  setHeader: (name: string, value: string) => void;
  /** Adds a Set-Cookie line. */
  addCookie: (line: string) => void;
}

/** What the loader of a resource sees: the actor is there, the body is not read yet. */
export interface LoadContext<P> extends RequestContext {
  actor: Actor;
  params: P;
}

export interface RouteInput {
  params: unknown;
  query: unknown;
  readBody: () => Promise<unknown>;
}

/** What a verb of a module works with: verbs of several modules share one transaction through `em`. */
export interface VerbContext {
  em: EntityManager;
  actor: Actor;
  now: Date;
}
