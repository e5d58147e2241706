import { chmodSync, existsSync, mkdtempSync, realpathSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { findPlace } from '#scripts/lib/postgres/place.mjs';
import type { Place } from './application.ts';

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.on('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const address = server.address();
      const port = typeof address === 'object' && address !== null ? address.port : 0;
      server.close(() => resolve(port));
    });
  });
}

/** A DATA_DIR and a port of one's own; `remove` takes the database with it, wherever it had to live. */
export async function temporaryPlace(): Promise<Place & { remove: () => void }> {
  const dataDir = realpathSync(mkdtempSync(join(tmpdir(), 'tallybarn-drill-')));
  chmodSync(dataDir, 0o711);
  const remove = () => {
    const homes = existsSync(join(dataDir, 'cluster.json')) ? [findPlace(dataDir).home] : [];
    for (const folder of [...homes, dataDir]) rmSync(folder, { recursive: true, force: true });
  };
  return { dataDir, port: await freePort(), remove };
}
