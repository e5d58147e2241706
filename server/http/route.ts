import { z } from 'zod';
import { ACTIONS } from '#shared/roles.ts';
import type { Action } from '#shared/roles.ts';
import { DomainError } from '#shared/errors.ts';
import type { ErrorCode } from '#shared/errors.ts';
import type { Actor } from './actor.ts';
import { can, dependsOnOwner } from './can.ts';
import type { Resource } from './can.ts';
import type { LoadContext, RequestContext, RouteInput } from './context.ts';
import type { OtherAnswer } from './other-answer.ts';
import { validate } from './validate.ts';

export type Access = 'public' | Action;
export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';

/** The actor of a guarded route is always there; of a public one never. */
type ActorOf<A extends Access> = A extends 'public' ? null : Actor;

export interface HandlerContext<
  A extends Access,
  P extends z.ZodType,
  Q extends z.ZodType,
  B extends z.ZodType,
  R,
> extends Omit<RequestContext, 'actor'> {
  actor: ActorOf<A>;
  params: z.output<P>;
  query: z.output<Q>;
  body: z.output<B>;
  resource: R;
}

export interface RouteHeader {
  name: string;
  required: boolean;
  description: string;
}

export interface RouteSpec<
  A extends Access,
  P extends z.ZodType,
  Q extends z.ZodType,
  B extends z.ZodType,
  S extends z.ZodType,
  R extends Resource | undefined,
> {
  method: Method;
  /** Express 5 style, from the root: /api/cases/:id */
  path: `/api/${string}`;
  operationId: string;
  summary: string;
  tag: string;
  /** Who may: everyone, or those whom the table of permissions and `can` allow this action. */
  access: A;
  /** What `can` judges: needed where the permission depends on an owner. Undefined answers 404. */
  resource?: (context: LoadContext<z.output<P>>) => Promise<R | undefined> | R;
  /** Where this is not allowed either, the resource is hidden: 404 in place of 403. */
  visibleBy?: Action;
  /** False for a POST that only computes: a read-only token may send it. Everything but GET changes by default. */
  changes?: boolean;
  /** True where a personal token will not do, whatever its scope. */
  sessionOnly?: boolean;
  params?: P;
  query?: Q;
  body?: B;
  /** The answer: what `handler` returns; without a schema, 204 and no content. */
  response?: S;
  status?: 200 | 201 | 202 | 204;
  /** Headers the handler reads, for the OpenAPI document. */
  headers?: readonly RouteHeader[];
  /** Refusals worth naming in the OpenAPI document, beyond those every route has. */
  refusals?: readonly ErrorCode[];
  /** Content types it may answer in besides JSON, for the OpenAPI document. */
  otherTypes?: readonly string[];
  handler: (
    context: HandlerContext<A, P, Q, B, R>,
  ) => Promise<z.input<S> | OtherAnswer> | z.input<S> | OtherAnswer;
}

/** A route as the router, the OpenAPI document and the permission test see it. */
export interface Route {
  method: Method;
  path: string;
  operationId: string;
  summary: string;
  tag: string;
  access: Access;
  changes: boolean;
  sessionOnly: boolean;
  owned: boolean;
  status: number;
  params: z.ZodType | undefined;
  query: z.ZodType | undefined;
  body: z.ZodType | undefined;
  response: z.ZodType | undefined;
  otherTypes: readonly string[];
  headers: readonly RouteHeader[];
  refusals: readonly ErrorCode[];
  run: (context: RequestContext, input: RouteInput) => Promise<unknown>;
}

const nothing = z.undefined();
const noBody = z.strictObject({}).optional();

function parseParams<P extends z.ZodType>(schema: P, value: unknown): z.output<P> {
  const result = schema.safeParse(value);
  if (!result.success) throw new DomainError('notFound', 'There is nothing at this address.');
  return result.data;
}

function refuseActor(action: Action): never {
  throw new DomainError('forbidden', `Your role does not allow this (${action}).`);
}

function checkDeclaration(route: { access?: unknown; operationId: string; owned: boolean }): void {
  const action = ACTIONS.find((known) => known === route.access);
  if (route.access !== 'public' && action === undefined) {
    throw new Error(
      `Route ${route.operationId} has no rule: give \`access\`, 'public' or an action.`,
    );
  }
  if (action && dependsOnOwner(action) && !route.owned) {
    throw new Error(
      `Route ${route.operationId}: ${action} depends on the owner, so say how the resource is loaded.`,
    );
  }
}

/**
 * Declares a route once: the router, the OpenAPI document and the permission test are made from it.
 * Order of the checks: who asks, origin, scope (router), then role, resource, query and body (here).
 */
export function defineRoute<
  const A extends Access,
  S extends z.ZodType = z.ZodVoid,
  P extends z.ZodType = z.ZodUndefined,
  Q extends z.ZodType = z.ZodUndefined,
  B extends z.ZodType = z.ZodUndefined,
  R extends Resource | undefined = undefined,
>(spec: RouteSpec<A, P, Q, B, S, R>): Route {
  const { access } = spec;
  checkDeclaration({ ...spec, owned: spec.resource !== undefined });

  async function permitted(context: RequestContext, params: z.output<P>): Promise<R> {
    const { actor } = context;
    if (access === 'public' || actor === null) return undefined as R;
    const action: Action = access;
    const resource = await spec.resource?.({ ...context, actor, params });
    if (spec.resource && resource === undefined) throw new DomainError('notFound', 'Not found.');
    const visible = spec.visibleBy === undefined || can(actor, spec.visibleBy, resource);
    if (!visible) throw new DomainError('notFound', 'Not found.');
    if (!can(actor, action, resource)) refuseActor(action);
    return resource as R;
  }

  return {
    method: spec.method,
    path: spec.path,
    operationId: spec.operationId,
    summary: spec.summary,
    tag: spec.tag,
    access,
    changes: spec.changes ?? spec.method !== 'get',
    sessionOnly: spec.sessionOnly ?? false,
    owned: spec.resource !== undefined,
    status: spec.status ?? (spec.response ? 200 : 204),
    params: spec.params,
    query: spec.query,
    body: spec.body,
    response: spec.response,
    otherTypes: spec.otherTypes ?? [],
    headers: spec.headers ?? [],
    refusals: spec.refusals ?? [],
    async run(context, input) {
      const params = parseParams((spec.params ?? nothing) as P, spec.params && input.params);
      const resource = await permitted(context, params);
      const query = validate((spec.query ?? nothing) as Q, spec.query && input.query);
      const sent = await input.readBody();
      if (spec.body && sent === undefined) {
        throw new DomainError('malformed', 'The body is empty; send JSON.');
      }
      const body = validate((spec.body ?? noBody) as B, sent);
      return spec.handler({
        ...context,
        actor: context.actor as ActorOf<A>,
        params,
        query,
        body,
        resource,
      });
    },
  };
}

/** The resource of routes about the actor's own account, sessions and tokens. */
export function ownAccount({ actor }: { actor: Actor }): Resource {
  return { ownerId: actor.id };
}
