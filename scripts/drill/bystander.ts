import process from 'node:process';

/** What a bystander asks, over and over. */
export interface Errand {
  url: string;
  headers: Record<string, string>;
  body: string;
}

export type BystanderOrder = { begin: Errand } | { end: true };

/** Milliseconds of each of its requests, the first of a new connection left out. */
export type BystanderReport = { times: number[] };

/**
 * Someone else at the same server, in a process of its own: what it measures holds neither the writing of a
 * hostile body nor the collection of garbage of whoever writes it.
 */
async function ask({ url, headers, body }: Errand): Promise<number> {
  const begun = performance.now();
  const answer = await fetch(url, { method: 'POST', headers, body });
  await answer.text();
  if (answer.status !== 200) throw new Error(`The bystander was answered ${answer.status}.`);
  return performance.now() - begun;
}

let over = true;

async function askUntilTold(errand: Errand): Promise<void> {
  over = false;
  await ask(errand);
  process.send?.({ ready: true });
  const times: number[] = [];
  do times.push(await ask(errand));
  while (!over);
  process.send?.({ times } satisfies BystanderReport);
}

process.on('message', (order: BystanderOrder) => {
  if ('end' in order) over = true;
  else void askUntilTold(order.begin);
});
