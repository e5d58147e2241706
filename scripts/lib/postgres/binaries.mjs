// @ts-check
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { Failure } from '../say.mjs';

/** @typedef {{ major: number, bin: string }} Binaries */

/**
 * @param {string} [folder] where Debian keeps its versions of PostgreSQL
 * @returns {Binaries[]} every version with a server, newest first
 */
export function findBinaries(folder = '/usr/lib/postgresql') {
  if (!existsSync(folder)) return [];
  return readdirSync(folder)
    .filter((name) => /^\d+$/.test(name))
    .map((name) => ({ major: Number(name), bin: join(folder, name, 'bin') }))
    .filter(({ bin }) => existsSync(join(bin, 'postgres')) && existsSync(join(bin, 'initdb')))
    .sort((one, other) => other.major - one.major);
}

/**
 * @param {string} data folder of the cluster
 * @returns {number | undefined} major version that made it
 */
export function majorOf(data) {
  const file = join(data, 'PG_VERSION');
  return existsSync(file) ? Number(readFileSync(file, 'utf8').trim()) : undefined;
}

/**
 * The version that made the cluster, or the newest for a new one. A cluster of a version that is not here is left
 * untouched.
 * @param {readonly Binaries[]} found newest first
 * @param {string} data
 * @returns {Binaries}
 */
export function binariesFor(found, data) {
  const newest = found[0];
  if (newest === undefined) {
    throw new Failure('PostgreSQL is not installed', 'run: sudo apt-get install -y postgresql');
  }
  const major = majorOf(data);
  if (major === undefined) return newest;
  const same = found.find((each) => each.major === major);
  if (same !== undefined) return same;
  throw new Failure(
    `the database in ${data} was made by PostgreSQL ${major}, and this machine has PostgreSQL ${newest.major}; it was left untouched`,
    [
      `install the version that made it (sudo apt-get install -y postgresql-${major}) and start again; or carry it over:`,
      `  on a machine with PostgreSQL ${major}: start Tallybarn on a copy of this DATA_DIR and, with the port and the`,
      '  databaseOwnerPassword of secrets.json:  pg_dump -h 127.0.0.1 -p PORT -U tallybarn_owner -Fc -f tallybarn.dump tallybarn',
      '  here: move this DATA_DIR away, start with DEMO=0 and, while it runs, likewise:',
      '  pg_restore -h 127.0.0.1 -p PORT -U tallybarn_owner -d tallybarn --clean --if-exists tallybarn.dump',
    ].join('\n'),
  );
}
