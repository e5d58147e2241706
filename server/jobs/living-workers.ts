import type { EntityManager } from '@mikro-orm/postgresql';
import { SILENCE_SECONDS } from './shares.ts';

/** Workers that gave a sign of life within the last seconds, as SQL. */
export const LIVING_WORKERS = `(select count(*)::integer from workers
  where heartbeat_at > clock_timestamp() - make_interval(secs => ${SILENCE_SECONDS}))`;

export async function countWorkers(em: EntityManager): Promise<number> {
  const [row] = await em.execute<{ workers: number }[]>(`select ${LIVING_WORKERS} as workers`);
  return row?.workers ?? 0;
}

export interface WorkerCard {
  id: string;
  machine: string;
  pid: number;
  version: string;
}

/** A worker's sign of life; it also removes the cards of workers that died long ago. */
export async function showLife(em: EntityManager, card: WorkerCard): Promise<void> {
  await em.execute(
    `insert into workers (id, machine, pid, version, started_at, heartbeat_at)
     values (?, ?, ?, ?, clock_timestamp(), clock_timestamp())
     on conflict (id) do update set heartbeat_at = clock_timestamp()`,
    [card.id, card.machine, card.pid, card.version],
  );
  await em.execute(
    `delete from workers where heartbeat_at < clock_timestamp() - interval '1 hour'`,
  );
}

export async function sayFarewell(em: EntityManager, id: string): Promise<void> {
  await em.execute('delete from workers where id = ?', [id]);
}
