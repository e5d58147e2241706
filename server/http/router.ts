import { Router } from 'express';
import type { Request, RequestHandler, Response } from 'express';
import { DomainError } from '#shared/errors.ts';
import type { AppDeps } from '#server/app.ts';
import type { Actor } from './actor.ts';
import type { RequestContext } from './context.ts';
import { finiteJson } from './finite-json.ts';
import { groupBy } from './group-by.ts';
import { logOf, requestIdOf } from './logging.ts';
import { checkOrigin } from './origin.ts';
import { readJson } from './read-body.ts';
import { OtherAnswer } from './other-answer.ts';
import type { Route } from './route.ts';

/** Who asks, by cookie or token; refuses (401) whoever cannot be told. */
export type Authenticate = (context: RequestContext) => Promise<Actor>;

function contextOf(req: Request, res: Response, deps: AppDeps): RequestContext {
  const gone = new AbortController();
  res.on('close', () => {
    if (!res.writableFinished) gone.abort();
  });
  return {
    em: deps.orm.em.fork(),
    actor: null,
    now: deps.clock(),
    signal: gone.signal,
    compute: deps.compute,
    config: deps.config,
    log: logOf(req),
    requestId: requestIdOf(req),
    address: req.ip ?? '',
    headers: req.headers,
    ifMatch: req.headers['if-match'],
    setHeader: (name, value) => void res.setHeader(name, value),
    addCookie: (line) => void res.append('Set-Cookie', line),
  };
}

function checkCredential(route: Route, { credential }: Actor): void {
  if (credential.kind !== 'token') return;
  if (route.sessionOnly) {
    throw new DomainError(
      'forbidden',
      'A personal token cannot do this; sign in to the application.',
    );
  }
  if (route.changes && !credential.mayWrite) {
    throw new DomainError(
      'forbidden',
      'This personal token may only read; make one with the scope "write".',
    );
  }
}

function send(route: Route, res: Response, answer: unknown, deps: AppDeps, req: Request): void {
  if (!route.response) {
    res.status(route.status).end();
    return;
  }
  const check = route.response.safeParse(answer);
  if (!check.success) {
    const fault = new Error(`The answer of ${route.operationId} breaks its contract.`, {
      cause: check.error,
    });
    if (deps.config.strictResponses) throw fault;
    logOf(req).error({ err: fault }, 'answer outside the contract');
  }
  res
    .status(route.status)
    .setHeader('Content-Type', 'application/json; charset=utf-8')
    .send(finiteJson(answer));
}

function handlerOf(route: Route, deps: AppDeps, authenticate: Authenticate): RequestHandler {
  return async (req, res) => {
    const context = contextOf(req, res, deps);
    res.setHeader('Cache-Control', 'no-store');
    const guarded = route.access !== 'public';
    if (route.method !== 'get') {
      const byCookie = guarded && req.headers.authorization === undefined;
      if (req.headers.authorization === undefined) {
        checkOrigin(req.headers, {
          publicUrl: deps.config.publicUrl,
          needed: byCookie && route.changes,
        });
      }
    }
    if (guarded) {
      context.actor = await authenticate(context);
      checkCredential(route, context.actor);
    }
    const answer = await route.run(context, {
      params: req.params,
      query: req.query,
      readBody: () => (route.method === 'get' ? Promise.resolve(undefined) : readJson(req, res)),
    });
    if (answer instanceof OtherAnswer) await answer.send(res);
    else send(route, res, answer, deps, req);
  };
}

function refuseMethod(allowed: readonly string[]): RequestHandler {
  const list = allowed.map((method) => method.toUpperCase()).join(', ');
  return (req, res) => {
    res.setHeader('Allow', list);
    throw new DomainError(
      'methodNotAllowed',
      `${req.method} is not known at this address; use ${list}.`,
    );
  };
}

/** The Express router of a list of routes. A route without a rule is refused here, even where types were evaded. */
export function buildRouter(
  routes: readonly Route[],
  deps: AppDeps,
  authenticate: Authenticate,
): Router {
  const router = Router({ caseSensitive: true });
  const byPath = groupBy(routes, (route) => route.path);
  const names = new Set(routes.map((route) => route.operationId));
  if (names.size !== routes.length) throw new Error('Two routes share an operationId.');
  for (const [path, group] of byPath) {
    for (const route of group) router[route.method](path, handlerOf(route, deps, authenticate));
    router.all(path, refuseMethod(group.map((route) => route.method)));
  }
  router.all('/api{/*path}', () => {
    throw new DomainError('notFound', 'There is nothing at this address; see /api/openapi.json.');
  });
  return router;
}
