import process from 'node:process';
import type { ServerConfig } from './config.ts';

/** Resolves, with the reason, when this process is to stop. */
export function stopWish({ stopWithStdin }: Pick<ServerConfig, 'stopWithStdin'>): Promise<string> {
  return new Promise((stop) => {
    process.once('SIGTERM', stop);
    process.once('SIGINT', stop);
    if (!stopWithStdin) return;
    // Whoever started this holds the other end: when it is gone, so are we.
    for (const event of ['end', 'close', 'error']) process.stdin.once(event, () => stop('stdin'));
    process.stdin.resume();
  });
}
