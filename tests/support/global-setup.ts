import process from 'node:process';
import { createShutdown } from '#scripts/lib/shutdown.mjs';
import { startTestCluster } from '#scripts/lib/postgres/test-cluster.mjs';

const VARIABLE = 'TEST_DATABASE_ADMIN_URL';

/**
 * The PostgreSQL of the tests: that of `npm test`, or one of its own when a developer runs single files. The first
 * project that needs it starts it, and the others find it in the environment.
 */
export default async function setup(): Promise<(() => Promise<void>) | undefined> {
  if (process.env[VARIABLE] !== undefined) return undefined;
  const shutdown = createShutdown();
  const { adminUrl, stop } = await startTestCluster(shutdown);
  process.env[VARIABLE] = adminUrl;
  return stop;
}
