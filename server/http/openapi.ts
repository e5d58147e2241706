import { OpenAPIRegistry, OpenApiGeneratorV31 } from '@asteasolutions/zod-to-openapi';
import type { RouteConfig } from '@asteasolutions/zod-to-openapi';
import { z } from 'zod';
import { problemSchema } from '#shared/contracts/problem-details.ts';
import type { ErrorCode } from '#shared/errors.ts';
import { groupBy } from './group-by.ts';
import type { AppConfig } from '#server/config.ts';
import { cookieNames } from './cookies.ts';
import { STATUS_OF } from './problem.ts';
import { defineRoute } from './route.ts';
import type { Route } from './route.ts';

const EVERY_ROUTE: readonly ErrorCode[] = ['malformed', 'internal', 'unavailable'];

function refusalsOf(route: Route): ErrorCode[] {
  const codes = [...EVERY_ROUTE, ...route.refusals];
  if (route.access !== 'public') codes.push('unauthenticated', 'forbidden');
  if (route.owned || route.params) codes.push('notFound');
  if (route.body) codes.push('invalidInput', 'unsupportedMediaType', 'payloadTooLarge');
  if (route.query) codes.push('invalidInput');
  return codes;
}

function responsesOf(route: Route): RouteConfig['responses'] {
  const responses: RouteConfig['responses'] = {
    [route.status]: route.response
      ? { description: 'Done.', content: { 'application/json': { schema: route.response } } }
      : { description: 'Done; nothing to answer.' },
  };
  const byStatus = groupBy(new Set(refusalsOf(route)), (code) => STATUS_OF[code]);
  for (const [status, codes] of byStatus) {
    responses[status] = {
      description: `Refused; code: ${codes.join(' or ')}.`,
      content: { 'application/problem+json': { schema: problemSchema } },
    };
  }
  return responses;
}

function objectOf(schema: z.ZodType | undefined): z.ZodObject | undefined {
  return schema instanceof z.ZodObject ? schema : undefined;
}

function pathConfig(route: Route): RouteConfig {
  const params = objectOf(route.params);
  const query = objectOf(route.query);
  const rule =
    route.access === 'public'
      ? 'Open to all.'
      : `Permission: ${route.access}.${route.sessionOnly ? ' Not by a personal token.' : ''}`;
  return {
    method: route.method,
    path: route.path.replace(/:(\w+)/g, '{$1}'),
    operationId: route.operationId,
    summary: route.summary,
    description: rule,
    tags: [route.tag],
    security: route.access === 'public' ? [] : [{ session: [] }, { personalToken: [] }],
    request: {
      ...(params && { params }),
      ...(query && { query }),
      ...(route.body && {
        body: { required: true, content: { 'application/json': { schema: route.body } } },
      }),
    },
    responses: responsesOf(route),
  };
}

type Described = Pick<AppConfig, 'version' | 'https' | 'publicUrl'>;

/** The OpenAPI 3.1 document of the routes, made from the schemas that validate them. */
export function openApiDocument(
  routes: readonly Route[],
  { version, https, publicUrl }: Described,
) {
  const registry = new OpenAPIRegistry();
  registry.registerComponent('securitySchemes', 'session', {
    type: 'apiKey',
    in: 'cookie',
    name: cookieNames(https).session,
  });
  registry.registerComponent('securitySchemes', 'personalToken', {
    type: 'http',
    scheme: 'bearer',
  });
  for (const route of routes) registry.registerPath(pathConfig(route));
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: {
      title: 'Tallybarn',
      version,
      description:
        'Cross sections in the Born approximation, with their errors. Quantities are {"value", "unit"}; refusals are problem documents (RFC 9457).',
    },
    servers: [{ url: publicUrl?.origin ?? '/' }],
  });
}

/** The routes and the one that describes them all. */
export function withOpenApi(routes: readonly Route[], config: Described): readonly Route[] {
  let document: Record<string, unknown> | undefined;
  const all: Route[] = [
    ...routes,
    defineRoute({
      method: 'get',
      path: '/api/openapi.json',
      operationId: 'getOpenApi',
      summary: 'This document',
      tag: 'Service',
      access: 'public',
      response: z.record(z.string(), z.unknown()),
      handler: () => (document ??= { ...openApiDocument(all, config) }),
    }),
  ];
  return all;
}
