import { once } from 'node:events';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { PassThrough } from 'node:stream';
import type { EntityManager, MikroORM } from '@mikro-orm/postgresql';
import request from 'supertest';
import { createApp } from '#server/app.ts';
import type { Compute } from '#server/compute/compute.ts';
import { VERSION } from '#server/version.ts';
import type { AppConfig } from '#server/config.ts';
import { openOrm } from '#server/db/orm.ts';
import { createLogger } from '#server/http/logging.ts';
import type { Route } from '#server/http/route.ts';
import { ROUTES } from '#server/http/routes.ts';
import type { Account } from '#server/modules/users/account.entity.ts';
import type { Role } from '#shared/roles.ts';
import { TEST_PASSWORD, makeAccount } from './factories.ts';
import { createTestDatabase } from './test-database.ts';
import type { TestDatabase } from './test-database.ts';

export type Agent = ReturnType<typeof request.agent>;

export interface TestAppOptions {
  config?: Partial<AppConfig>;
  compute?: Compute;
  routes?: readonly Route[];
  /** Another way to the same database, such as one that can be cut. */
  databaseUrl?: (url: string) => string;
}

export interface TestApp {
  url: string;
  orm: MikroORM;
  /** A fresh entity manager, under the runtime role as in production. */
  em: () => EntityManager;
  database: TestDatabase;
  config: AppConfig;
  clock: { now: () => Date; advance: (milliseconds: number) => void };
  /** Everything logged so far, as text. */
  logs: () => string;
  /** Nobody: no cookie, the right origin. */
  anonymous: () => Agent;
  /** A browser signed in as this account, or as a new account of this role. */
  signedIn: (who: Role | Account) => Promise<Agent>;
  /** As above, with the account it is. */
  person: (role: Role) => Promise<{ account: Account; agent: Agent }>;
  close: () => Promise<void>;
}

/** The engine in this thread: the same functions the worker threads run. */
const inThread: Compute = async (kind, input) => {
  const { ENGINE } = await import('#server/compute/engine-kinds.ts');
  return ENGINE[kind](input);
};

function testConfig(changes: Partial<AppConfig>): AppConfig {
  return {
    version: VERSION,
    host: '127.0.0.1',
    publicUrl: undefined,
    https: false,
    demo: true,
    demoAccountsOpen: true,
    signingKey: 'a signing key for tests, long enough to sign',
    passwordCost: 4,
    clientDir: undefined,
    strictResponses: true,
    ...changes,
  };
}

function movableClock() {
  let shift = 0;
  return {
    now: () => new Date(Date.now() + shift),
    advance: (milliseconds: number) => {
      shift += milliseconds;
    },
  };
}

/** The whole application on a throw-away database, listening on a free port of this machine. */
export async function createTestApp(options: TestAppOptions = {}): Promise<TestApp> {
  const database = await createTestDatabase();
  const databaseUrl = options.databaseUrl?.(database.runtimeUrl) ?? database.runtimeUrl;
  const orm = await openOrm({ databaseUrl });
  const config = testConfig(options.config ?? {});
  const clock = movableClock();
  const lines: string[] = [];
  const sink = new PassThrough();
  sink.on('data', (chunk: Buffer) => lines.push(chunk.toString()));
  const deps = {
    orm,
    config,
    compute: options.compute ?? inThread,
    logger: createLogger('info', sink),
    clock: clock.now,
  };
  const server = createServer(createApp(deps, options.routes ?? ROUTES));
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  const url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;

  const anonymous = (): Agent => request.agent(url).set('Origin', url);
  const em = () => orm.em.fork();
  const signedIn = async (who: Role | Account): Promise<Agent> => {
    const account = typeof who === 'string' ? await makeAccount(em(), { role: who }) : who;
    const agent = anonymous();
    await agent
      .post('/api/auth/sign-in')
      .send({ email: account.email, password: TEST_PASSWORD })
      .expect(200);
    return agent;
  };
  return {
    url,
    orm,
    em,
    database,
    config,
    clock,
    logs: () => lines.join(''),
    anonymous,
    signedIn,
    async person(role) {
      const account = await makeAccount(em(), { role });
      return { account, agent: await signedIn(account) };
    },
    async close() {
      server.closeAllConnections();
      server.close();
      await orm.close(true);
      await database.drop();
    },
  };
}
