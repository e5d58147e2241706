import {
  changePasswordSchema,
  sessionSchema,
  signInSchema,
  signedInSchema,
} from '#shared/contracts/auth.ts';
import { defineRoute, ownAccount } from '#server/http/route.ts';
import { presentUser } from '#server/modules/users/present-user.ts';
import { changePassword } from './change-password.ts';
import { clearSessionCookies } from './issue-session.ts';
import { signIn } from './sign-in.ts';
import { signOut } from './sign-out.ts';

export const authRoutes = [
  defineRoute({
    method: 'post',
    path: '/api/auth/sign-in',
    operationId: 'signIn',
    summary: 'Sign in with e-mail address and password',
    tag: 'Sign-in',
    access: 'public',
    body: signInSchema,
    response: signedInSchema,
    refusals: ['signInFailed', 'tooManyRequests'],
    handler: async ({ body, ...context }) => ({ user: presentUser(await signIn(context, body)) }),
  }),
  defineRoute({
    method: 'post',
    path: '/api/auth/sign-out',
    operationId: 'signOut',
    summary: 'End this session',
    tag: 'Sign-in',
    access: 'session.own',
    resource: ownAccount,
    sessionOnly: true,
    async handler(context) {
      await signOut(context);
      clearSessionCookies(context);
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/auth/session',
    operationId: 'getSession',
    summary: 'Who is signed in',
    tag: 'Sign-in',
    access: 'session.own',
    resource: ownAccount,
    response: sessionSchema,
    handler: ({ actor, config }) => ({ user: presentUser(actor), demo: config.demo }),
  }),
  defineRoute({
    method: 'post',
    path: '/api/auth/password',
    operationId: 'changePassword',
    summary: 'Change your own password; other sessions end',
    tag: 'Sign-in',
    access: 'session.own',
    resource: ownAccount,
    sessionOnly: true,
    body: changePasswordSchema,
    refusals: ['tooManyRequests'],
    handler: ({ body, address, config, ...context }) =>
      changePassword(context, body, { address, passwordCost: config.passwordCost }),
  }),
];
