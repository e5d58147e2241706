import { z } from 'zod';
import { DomainError } from '#shared/errors.ts';
import { demoAccountsUsable } from '#server/modules/auth/demo-gate.ts';
import { defineRoute } from '#server/http/route.ts';
import { countWorkers } from '#server/jobs/living-workers.ts';

const healthSchema = z.object({
  status: z.literal('ok'),
  version: z.string(),
  database: z.literal('ok'),
  /** Whether the demo's accounts can sign in from where this is asked. */
  demo: z.boolean(),
  /** Workers alive on this database; without one, jobs wait. */
  workers: z.int(),
});

export const healthRoutes = [
  defineRoute({
    method: 'get',
    path: '/api/health',
    operationId: 'getHealth',
    summary: 'Whether the application and its database answer',
    tag: 'Service',
    access: 'public',
    response: healthSchema,
    async handler({ em, config, log, headers }) {
      let workers: number;
      try {
        workers = await countWorkers(em);
      } catch (fault) {
        log.warn({ err: fault }, 'the database does not answer');
        throw new DomainError('unavailable', 'The database does not answer.', {
          extra: { database: 'unreachable', version: config.version, retryAfter: 5 },
        });
      }
      return {
        status: 'ok' as const,
        version: config.version,
        database: 'ok' as const,
        demo: demoAccountsUsable(config, headers),
        workers,
      };
    },
  }),
];
