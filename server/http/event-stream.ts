import type { Response } from 'express';
import { DomainError } from '#shared/errors.ts';
import { finiteJson } from './finite-json.ts';
import { OtherAnswer } from './other-answer.ts';

const HEARTBEAT_MILLISECONDS = 15_000;
/** Then the browser comes again by itself, and is asked anew who it is. */
const LIFE_MILLISECONDS = 5 * 60_000;
const COME_AGAIN_MILLISECONDS = 2_000;

export interface StreamEvent {
  id: string;
  event: string;
  data: unknown;
}

/** Each asks the database twice a second; a browser keeps six connections at most. */
const MOST_OF_ONE_PERSON = 16;

const open = new Map<() => void, string>();

/** Ends every stream of this process, so that a server that stops need not wait for them. */
export function endStreams(): void {
  for (const end of [...open.keys()]) end();
}

function textOf({ id, event, data }: StreamEvent): string {
  return `id: ${id}\nevent: ${event}\ndata: ${finiteJson(data)}\n\n`;
}

function requireRoom(personId: string): void {
  const held = [...open.values()].filter((id) => id === personId).length;
  if (held < MOST_OF_ONE_PERSON) return;
  throw new DomainError(
    'tooManyRequests',
    `You watch ${held} streams of events already; close one first.`,
    { extra: { retryAfter: 5 } },
  );
}

/** Server-sent events: `feed` sends them until it returns or `signal` aborts, as it does when the client leaves. */
export function eventStream(
  personId: string,
  feed: (send: (event: StreamEvent) => void, signal: AbortSignal) => Promise<void>,
): OtherAnswer {
  requireRoom(personId);
  return new OtherAnswer(async (res: Response) => {
    res.writeHead(200, {
      'Content-Type': 'text/event-stream; charset=utf-8',
      // No proxy may hold events back or pack them.
      'Cache-Control': 'no-store, no-transform',
      'X-Accel-Buffering': 'no',
    });
    res.write(`retry: ${COME_AGAIN_MILLISECONDS}\n\n`);
    const ending = new AbortController();
    const end = () => ending.abort();
    open.set(end, personId);
    res.on('close', end);
    const heart = setInterval(() => res.write(': still here\n\n'), HEARTBEAT_MILLISECONDS);
    const life = setTimeout(end, LIFE_MILLISECONDS);
    try {
      await feed((event) => void res.write(textOf(event)), ending.signal);
    } finally {
      open.delete(end);
      clearInterval(heart);
      clearTimeout(life);
      res.end();
    }
  });
}
