import express from 'express';
import type { Express } from 'express';
import type { MikroORM } from '@mikro-orm/postgresql';
import type { Logger } from 'pino';
import { DomainError } from '#shared/errors.ts';
import type { Compute } from '#server/compute/compute.ts';
import type { AppConfig } from './config.ts';
import { clientFiles } from './http/client-files.ts';
import { errorEdge } from './http/error-edge.ts';
import { requestLog } from './http/logging.ts';
import { withOpenApi } from './http/openapi.ts';
import type { Route } from './http/route.ts';
import { buildRouter } from './http/router.ts';
import { ROUTES } from './http/routes.ts';
import { securityHeaders } from './http/security-headers.ts';
import { authenticate } from './modules/auth/authenticate.ts';

export interface AppDeps {
  orm: MikroORM;
  config: AppConfig;
  compute: Compute;
  logger: Logger;
  clock: () => Date;
}

/** The application from its explicit dependencies; it listens nowhere by itself. */
export function createApp(deps: AppDeps, routes: readonly Route[] = ROUTES): Express {
  const { config } = deps;
  const app = express();
  app.disable('x-powered-by');
  app.disable('etag');
  // Only a proxy on this machine is believed about who is behind it.
  app.set('trust proxy', 'loopback');
  app.use(requestLog(deps.logger));
  app.use(securityHeaders(config));
  app.use(buildRouter(withOpenApi(routes, config), deps, authenticate));
  if (config.clientDir !== undefined) app.use(clientFiles(config.clientDir));
  app.use(() => {
    throw new DomainError('notFound', 'There is nothing at this address.');
  });
  app.use(errorEdge);
  return app;
}
