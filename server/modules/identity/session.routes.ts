import { SessionResponse, SignInBody, SignOutResponse } from '#shared/contracts/identity.ts';
import type { Context, SessionControl } from '#server/http/context.ts';
import { route, type Route } from '#server/http/route.ts';
import { anyone, signedIn } from '#server/policy/permission.ts';
import { currentSession } from './session.queries.ts';

export const sessionRoutes: Route[] = [
  route({
    method: 'get',
    path: '/api/session',
    summary: 'Who is signed in; asking without sign-in is no failure.',
    permission: anyone,
    act: (context) => currentSession(context),
    response: SessionResponse,
    present: (session) => session,
  }),
  route({
    method: 'post',
    path: '/api/session',
    summary: 'Signs in with e-mail and password.',
    permission: anyone,
    body: SignInBody,
    act: async (context, { body }) => {
      const user = await sessionOf(context).signIn(body.email, body.password);
      return currentSession({ ...context, user });
    },
    response: SessionResponse,
    present: (session) => session,
  }),
  route({
    method: 'delete',
    path: '/api/session',
    summary: 'Signs out.',
    permission: signedIn,
    act: (context) => sessionOf(context).signOut(),
    response: SignOutResponse,
    present: () => ({ signedOut: true as const }),
  }),
];

function sessionOf(context: Context): SessionControl {
  if (!context.session) throw new Error('A session is opened and closed from a request only');
  return context.session;
}
