import { z } from 'zod';
import { problemSchema } from '#shared/contracts/problem-details.ts';
import type { ErrorCode } from '#shared/errors.ts';
import type { AppConfig } from '#server/config.ts';
import { cookieNames } from './cookies.ts';
import { groupBy } from './group-by.ts';
import { JsonSchemas } from './json-schemas.ts';
import type { JsonSchema } from './json-schemas.ts';
import { STATUS_OF } from './problem.ts';
import { defineRoute } from './route.ts';
import type { Route } from './route.ts';

type Described = Pick<AppConfig, 'version' | 'https' | 'publicUrl'>;

const EVERY_ROUTE: readonly ErrorCode[] = ['malformed', 'internal', 'unavailable'];

function refusalsOf(route: Route): Set<ErrorCode> {
  const codes = new Set([...EVERY_ROUTE, ...route.refusals]);
  const add = (when: unknown, ...more: ErrorCode[]) => when && more.forEach((c) => codes.add(c));
  add(route.access !== 'public', 'unauthenticated', 'forbidden');
  add(route.params, 'notFound');
  add(route.body, 'invalidInput', 'unsupportedMediaType', 'payloadTooLarge');
  add(route.query, 'invalidInput');
  return codes;
}

const TEXT = { type: 'string' };

function responsesOf(route: Route, schemas: JsonSchemas): JsonSchema {
  const content = {
    ...(route.response && {
      'application/json': { schema: schemas.of(route.response, 'output') },
    }),
    ...Object.fromEntries(route.otherTypes.map((type) => [type, { schema: TEXT }])),
  };
  const done =
    Object.keys(content).length > 0
      ? { description: 'Done.', content }
      : { description: 'Done; nothing to answer.' };
  const problem = { schema: schemas.of(problemSchema, 'output') };
  const refused = [...groupBy(refusalsOf(route), (code) => STATUS_OF[code])].map(
    ([status, codes]) => [
      status,
      {
        description: `Refused; code: ${codes.join(' or ')}.`,
        content: { 'application/problem+json': problem },
      },
    ],
  );
  return { [route.status]: done, ...(Object.fromEntries(refused) as JsonSchema) };
}

/** The properties of an object schema as parameters of the address. */
function parametersOf(
  schema: z.ZodType | undefined,
  where: 'path' | 'query',
  schemas: JsonSchemas,
): JsonSchema[] {
  if (!schema) return [];
  const { properties = {}, required = [] } = schemas.of(schema, 'input') as {
    properties?: Record<string, JsonSchema>;
    required?: string[];
  };
  return Object.entries(properties).map(([name, property]) => ({
    name,
    in: where,
    required: where === 'path' || required.includes(name),
    schema: property,
  }));
}

function operationOf(route: Route, schemas: JsonSchemas): JsonSchema {
  const open = route.access === 'public';
  const rule = open ? 'Open to all.' : `Permission: ${route.access}.`;
  const parameters = [
    ...parametersOf(route.params, 'path', schemas),
    ...parametersOf(route.query, 'query', schemas),
    ...route.headers.map((header) => ({ ...header, in: 'header', schema: { type: 'string' } })),
  ];
  const body = route.body && {
    required: true,
    content: { 'application/json': { schema: schemas.of(route.body, 'input') } },
  };
  return {
    operationId: route.operationId,
    summary: route.summary,
    description: `${rule}${route.sessionOnly ? ' Not by a personal token.' : ''}`,
    tags: [route.tag],
    security: open ? [] : [{ session: [] }, { personalToken: [] }],
    ...(parameters.length > 0 && { parameters }),
    ...(body && { requestBody: body }),
    responses: responsesOf(route, schemas),
  };
}

/** The OpenAPI 3.1 document of the routes, made from the schemas that validate them. */
export function openApiDocument(
  routes: readonly Route[],
  { version, https, publicUrl }: Described,
): JsonSchema {
  const schemas = new JsonSchemas();
  const paths: Record<string, JsonSchema> = {};
  for (const route of routes) {
    const path = route.path.replace(/:(\w+)/g, '{$1}');
    paths[path] = { ...paths[path], [route.method]: operationOf(route, schemas) };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Tallybarn',
      version,
      description:
        'Cross sections in the Born approximation, with their errors. Quantities are {"value", "unit"}; refusals are problem documents (RFC 9457).',
    },
    servers: [{ url: publicUrl?.origin ?? '/' }],
    paths,
    components: {
      schemas: schemas.components,
      securitySchemes: {
        session: { type: 'apiKey', in: 'cookie', name: cookieNames(https).session },
        personalToken: { type: 'http', scheme: 'bearer' },
      },
    },
  };
}

/** The routes and the one that describes them all. */
export function withOpenApi(routes: readonly Route[], config: Described): readonly Route[] {
  let document: JsonSchema | undefined;
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
      handler: () => (document ??= openApiDocument(all, config)),
    }),
  ];
  return all;
}
