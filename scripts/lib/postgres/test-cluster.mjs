// @ts-check
import { randomBytes } from 'node:crypto';
import {
  chmodSync,
  chownSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  readdirSync,
  realpathSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import process from 'node:process';
import { endProcess, identify, isSameAndRunning } from '../identity.mjs';
import { Failure } from '../say.mjs';
import { findBinaries } from './binaries.mjs';
import { ADMIN, ensureCluster, livingPostmaster, startCluster } from './cluster.mjs';
import { urlOf } from './database.mjs';
import { findAccount } from './place.mjs';

const PREFIX = 'tallybarn-test-';

/** Nobody misses what a test wrote when the machine loses power. */
const FAST = ['fsync=off', 'full_page_writes=off', 'synchronous_commit=off'];

/** Removes what runs that were killed left in the folder for temporary files. */
async function sweep() {
  for (const name of readdirSync(tmpdir()).filter((each) => each.startsWith(PREFIX))) {
    const folder = join(tmpdir(), name);
    const owner = join(folder, 'owner.json');
    if (!existsSync(owner) || statSync(folder).uid !== process.getuid?.()) continue;
    if (isSameAndRunning(JSON.parse(readFileSync(owner, 'utf8')))) continue;
    const home = join(folder, 'postgres');
    const orphan = existsSync(home) ? livingPostmaster(home) : undefined;
    if (orphan !== undefined) await endProcess(orphan.pid, [['SIGQUIT', 5_000]]);
    rmSync(folder, { recursive: true, force: true });
  }
}

/**
 * A cluster for one run of the tests, in a folder for temporary files where the account postgres can get to it.
 * @param {import('../shutdown.mjs').Shutdown} shutdown
 * @returns {Promise<{ adminUrl: string, stop: () => Promise<void> }>} address for the superuser
 */
export async function startTestCluster(shutdown) {
  await sweep();
  const found = findBinaries()[0];
  if (found === undefined) {
    throw new Failure('PostgreSQL is not installed', 'run: sudo apt-get install -y postgresql');
  }
  const folder = realpathSync(mkdtempSync(join(tmpdir(), PREFIX)));
  const removeFolder = async () => rmSync(folder, { recursive: true, force: true });
  const forget = shutdown.onStop(removeFolder);
  chmodSync(folder, 0o711);
  writeFileSync(join(folder, 'owner.json'), JSON.stringify(identify(process.pid)));
  const home = join(folder, 'postgres');
  mkdirSync(home, { mode: 0o700 });
  const account = process.getuid?.() === 0 ? findAccount('postgres') : undefined;
  if (account !== undefined) chownSync(home, account.uid, account.gid);
  const adminPassword = randomBytes(18).toString('base64url');
  const cluster = {
    home,
    bin: found.bin,
    account,
    adminPassword,
    log: join(folder, 'postgres.log'),
    options: FAST,
  };
  await ensureCluster(shutdown, cluster);
  const { port, stop } = await startCluster(shutdown, cluster);
  return {
    adminUrl: urlOf({ port, user: ADMIN, password: adminPassword, database: 'postgres' }),
    async stop() {
      await stop();
      await removeFolder();
      forget();
    },
  };
}
