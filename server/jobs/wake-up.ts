import type { EntityManager } from '@mikro-orm/postgresql';
import PgBoss from 'pg-boss';

export const QUEUE = 'jobs';

/** More would only be fetched and forgotten: a worker looks for further shares by itself. */
const MOST_WAKE_UPS = 8;

/** The queue's statements number their parameters; ours are question marks in order. */
function inOrder(text: string, values: readonly unknown[]): { sql: string; params: unknown[] } {
  const params: unknown[] = [];
  const sql = text.replaceAll('?', '\\?').replace(/\$(\d+)/g, (_all, n: string) => {
    params.push(parameter(values[Number(n) - 1]));
    return '?';
  });
  return { sql, params };
}

function parameter(value: unknown): unknown {
  if (Array.isArray(value)) return `{${value.map((item) => JSON.stringify(item)).join(',')}}`;
  if (typeof value === 'object' && value !== null) return JSON.stringify(value);
  return value ?? null;
}

/**
 * The database as pg-boss wants it, over the ORM's connections: a wake-up is sent in the transaction that makes its job, and
 * no second pool is opened.
 */
export function bossDatabase(em: () => EntityManager): PgBoss.Db {
  return {
    async executeSql(text, values: unknown[] = []) {
      // A failed statement between BEGIN and COMMIT would leave the connection, which is pooled, within a dead transaction.
      const whole = /^\s*BEGIN;([\s\S]*?);?\s*COMMIT;\s*$/.exec(text)?.[1];
      if (whole !== undefined) {
        await em().transactional((tx) => tx.execute(whole));
        return { rows: [] };
      }
      const { sql, params } = inOrder(text, values);
      return { rows: await em().execute<unknown[]>(sql, params) };
    },
  };
}

/** Nothing here makes or changes its schema: that belongs to the migrations. */
export function openBoss(db: PgBoss.Db, { supervise = false } = {}): PgBoss {
  return new PgBoss({ db, migrate: false, schedule: false, supervise });
}

/** Sends wake-ups with the transaction of `em`; nothing is sent if it is rolled back. */
export async function wakeWorkers(em: EntityManager, jobId: string, shares: number): Promise<void> {
  const db = bossDatabase(() => em);
  const wakeUps = Array.from({ length: Math.min(shares, MOST_WAKE_UPS) }, () => ({
    name: QUEUE,
    data: { jobId },
  }));
  await openBoss(db).insert(wakeUps, { db });
}
