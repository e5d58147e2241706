// @ts-check
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import {
  chownSync,
  existsSync,
  mkdirSync,
  readFileSync,
  realpathSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { Failure, say } from '../say.mjs';

/**
 * @typedef {import('../processes.mjs').Account} Account
 * @typedef {{ home: string, account: Account | undefined }} Place
 */

/**
 * @param {string | number} who name or number of an account
 * @returns {Account | undefined}
 */
export function findAccount(who) {
  const line = spawnSync('getent', ['passwd', String(who)], { encoding: 'utf8' }).stdout ?? '';
  const [name, , uid, gid] = line.trim().split(':');
  return name === undefined || uid === undefined
    ? undefined
    : { name, uid: Number(uid), gid: Number(gid) };
}

/**
 * @param {Account} account
 * @param {string} folder
 * @returns {boolean} whether the account can enter the folder from the top
 */
export function canWalkTo(account, folder) {
  const { uid, gid } = account;
  return spawnSync('/bin/sh', ['-c', 'cd "$1"', 'sh', folder], { uid, gid, cwd: '/' }).status === 0;
}

/**
 * Where a new cluster lives: in DATA_DIR, or below /var/lib when the account that runs it cannot get there.
 * @param {string} dataDir
 * @param {boolean} reachable
 * @param {(path: string) => boolean} exists
 * @param {string} [elsewhere]
 * @returns {string}
 */
export function newHome(dataDir, reachable, exists = existsSync, elsewhere = '/var/lib') {
  if (reachable) return join(dataDir, 'postgres');
  const mark = createHash('sha256').update(dataDir).digest('hex').slice(0, 12);
  const base = join(elsewhere, `tallybarn-${mark}`);
  // A folder of that name belongs to an earlier DATA_DIR that stood here: its data is not ours to use or remove.
  let home = base;
  for (let n = 2; exists(home); n += 1) home = `${base}-${n}`;
  return home;
}

/**
 * @param {string} home an existing home
 * @returns {Account | undefined} the account to run it as, when that is not ours
 */
function accountOf(home) {
  const { uid } = statSync(home);
  const mine = process.getuid?.() ?? uid;
  if (uid === mine && uid !== 0) return undefined;
  const owner = findAccount(uid);
  if (mine === 0 && uid !== 0 && owner !== undefined) return owner;
  throw new Failure(
    `the database in ${home} belongs to ${owner?.name ?? `account ${uid}`}`,
    uid === 0 ? `run: chown -R postgres ${home}` : 'start Tallybarn as that account, or as root',
  );
}

/**
 * @param {string} dataDir an existing folder
 * @returns {Place} found again by the record in DATA_DIR, or new
 */
export function findPlace(dataDir) {
  const record = join(dataDir, 'cluster.json');
  if (existsSync(record)) {
    /** @type {{ home: string }} */
    const { home } = JSON.parse(readFileSync(record, 'utf8'));
    if (!existsSync(home)) {
      throw new Failure(
        `the database folder ${home}, recorded in ${record}, is gone`,
        `bring it back from a copy; or remove ${record} to begin with an empty database`,
      );
    }
    return { home, account: accountOf(home) };
  }
  const account = process.getuid?.() === 0 ? findAccount('postgres') : undefined;
  if (process.getuid?.() === 0 && account === undefined) {
    throw new Failure(
      'there is no account named postgres to run the database as; it refuses to run as root',
      "install Debian's package (apt-get install -y postgresql), or start Tallybarn as an ordinary user",
    );
  }
  const real = realpathSync(dataDir);
  const home = newHome(real, account === undefined || canWalkTo(account, real));
  if (!home.startsWith(`${real}/`)) {
    say(
      `The account postgres cannot reach ${real}, so the database lives in ${home} (recorded in ${record}).`,
    );
  }
  mkdirSync(home, { recursive: true, mode: 0o700 });
  if (account !== undefined) chownSync(home, account.uid, account.gid);
  writeFileSync(record, `${JSON.stringify({ home }, null, 2)}\n`, { mode: 0o600 });
  return { home, account };
}
