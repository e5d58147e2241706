import { existsSync } from 'node:fs';
import { join } from 'node:path';
import express, { Router } from 'express';
import { DomainError } from '#shared/errors.ts';

/**
 * The built client: hashed assets are kept for good, the page itself is asked for each time, and every other
 * address of the application is answered by the page.
 */
export function clientFiles(folder: string): Router {
  const router = Router();
  const page = join(folder, 'index.html');
  const assets = { immutable: true, maxAge: '365d', index: false, fallthrough: false } as const;
  router.use('/assets', express.static(join(folder, 'assets'), assets));
  router.use(express.static(folder, { index: false, cacheControl: true, maxAge: 0 }));
  router.get('/{*path}', (_req, res) => {
    if (!existsSync(page)) {
      throw new DomainError('unavailable', 'The client is not built; run `npm start`.');
    }
    res.setHeader('Cache-Control', 'no-cache');
    res.sendFile(page, { cacheControl: false });
  });
  return router;
}
