import type { Action, Role } from '#shared/roles.ts';
import { ROLES } from '#shared/roles.ts';
import type { Route } from '#server/http/route.ts';
import type { Account } from '#server/modules/users/account.entity.ts';
import type { Agent, TestApp } from './test-app.ts';

/** How the person who asks stands to the resource: theirs, of a campaign of theirs, or neither. */
export const STANDINGS = ['owner', 'member', 'outsider'] as const;
export type Standing = (typeof STANDINGS)[number];

/** `allowed` is any answer that is no refusal of rights; `hidden` is 404. */
export type Outcome = 'allowed' | 'forbidden' | 'hidden';

export interface Rule {
  /** Named by hand, so that a slip in a route or in the table of roles is seen here. */
  access: 'public' | Action;
  /** What each role is answered: always, or by how the person stands to the resource. */
  expect: Record<Role, Outcome | Record<Standing, Outcome>>;
  /** Makes what the route needs, standing so to `person`, and says what to send. */
  prepare?: (app: TestApp, person: Account, standing: Standing) => Promise<Request> | Request;
}

interface Request {
  params?: Record<string, string>;
  body?: object;
  headers?: Record<string, string>;
}

export interface Walked {
  route: string;
  role: Role;
  standing: Standing;
  expected: Outcome;
  got: Outcome;
  status: number;
}

export const ALLOWED_TO_ALL: Rule['expect'] = {
  experimentalist: 'allowed',
  theorist: 'allowed',
  manager: 'allowed',
  administrator: 'allowed',
};

export const ADMINISTRATORS_ONLY: Rule['expect'] = {
  experimentalist: 'forbidden',
  theorist: 'forbidden',
  manager: 'forbidden',
  administrator: 'allowed',
};

function outcomeOf(status: number): Outcome {
  if (status === 403) return 'forbidden';
  return status === 404 ? 'hidden' : 'allowed';
}

/** Sends the request of a route; a POST that needs nothing is sent with nothing. */
export function sendRoute(agent: Agent, route: Route, request: Request) {
  const path = route.path.replace(/:(\w+)/g, (_all, name: string) => request.params?.[name] ?? '');
  const sending = agent[route.method](path);
  for (const [name, value] of Object.entries(request.headers ?? {})) void sending.set(name, value);
  return request.body ? sending.send(request.body) : sending;
}

/** Every role and standing against one route: what was expected and what the application answered. */
export async function walkRoute(app: TestApp, route: Route, rule: Rule): Promise<Walked[]> {
  const walked: Walked[] = [];
  for (const role of ROLES) {
    const { account, agent } = await app.person(role);
    const expected = rule.expect[role];
    for (const standing of STANDINGS) {
      const request = (await rule.prepare?.(app, account, standing)) ?? {};
      const { status } = await sendRoute(agent, route, request);
      walked.push({
        route: route.operationId,
        role,
        standing,
        expected: typeof expected === 'string' ? expected : expected[standing],
        got: outcomeOf(status),
        status,
      });
      if (route.operationId === 'signOut' || status === 401) {
        await agent
          .post('/api/auth/sign-in')
          .send({ email: account.email, password: 'a password for tests' });
      }
    }
  }
  return walked;
}
