// @ts-check
import { existsSync } from 'node:fs';
import { Failure } from '../say.mjs';
import { ensureSecrets } from '../secrets.mjs';
import { livingPostmaster } from './cluster.mjs';
import { DATABASE, OWNER, RUNTIME, urlOf } from './database.mjs';
import { findPlace } from './place.mjs';

/**
 * The private database of a Tallybarn that is running.
 * @param {import('../settings.mjs').Settings} settings
 * @param {Failure} [otherwise] said when none runs there
 */
export function databaseInUse(settings, otherwise) {
  const postmaster = existsSync(settings.dataDir)
    ? livingPostmaster(findPlace(settings.dataDir).home)
    : undefined;
  if (postmaster === undefined) {
    throw (
      otherwise ??
      new Failure(
        'Tallybarn is just starting or stopping on this DATA_DIR',
        'try again in a moment',
      )
    );
  }
  const { secrets } = ensureSecrets(settings.secretsFile);
  const { port } = postmaster;
  const access = { port, database: DATABASE };
  return {
    runtimeUrl: urlOf({ ...access, user: RUNTIME, password: secrets.databaseRuntimePassword }),
    ownerUrl: urlOf({ ...access, user: OWNER, password: secrets.databaseOwnerPassword }),
  };
}
