import { DeskResponse, FindQuery, FindResponse } from '#shared/contracts/desk.ts';
import { route, type Route } from '#server/http/route.ts';
import { signedIn } from '#server/policy/permission.ts';
import { deskOf } from './desk.queries.ts';
import { findAnything } from './find.queries.ts';

export const deskRoutes: Route[] = [
  route({
    method: 'get',
    path: '/api/desk',
    summary: 'What needs this person today, by role.',
    permission: signedIn,
    act: (context) => deskOf(context, context.user),
    response: DeskResponse,
    present: (desk) => desk,
  }),
  route({
    method: 'get',
    path: '/api/find',
    summary: 'Anything by registry number, marking, certificate number or laboratory.',
    permission: signedIn,
    query: FindQuery,
    act: (context, { query }) => findAnything(context.database, context.user, query.q),
    response: FindResponse,
    present: (found) => ({ found }),
  }),
];
