import { randomUUID } from 'node:crypto';
import type { Request, RequestHandler } from 'express';
import type { Sequelize } from 'sequelize';
import { makeContext, type Clock, type Context } from './context.ts';

const contexts = new WeakMap<Request, Context>();
const REQUEST_ID = /^[A-Za-z0-9._-]{8,64}$/;

/** Gives every request its context. The id comes from the client where it is well-formed, so that both logs name it. */
export function requestContext(
  database: Sequelize,
  parts: { clock: Clock; dataDir: string; checksEveryReply: boolean },
): RequestHandler {
  return (request, response, next) => {
    const asked = request.get('x-request-id');
    const requestId = asked && REQUEST_ID.test(asked) ? asked : randomUUID();
    response.setHeader('X-Request-Id', requestId);
    contexts.set(request, makeContext({ requestId, database, ...parts }));
    next();
  };
}

/** Puts the signed-in person, as passport found them, into the context. */
export const userIntoContext: RequestHandler = (request, _response, next) => {
  contextOf(request).user = request.user ?? null;
  next();
};

/** The context of a request that passed `requestContext`. */
export function contextOf(request: Request): Context {
  const context = contexts.get(request);
  if (!context) throw new Error('The request reached a handler without its context');
  return context;
}
