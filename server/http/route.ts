import { raw, type RequestHandler, type Response } from 'express';
import type { z } from 'zod';
import { authorize, type Permission } from '#server/policy/permission.ts';
import type { User } from '#server/policy/user.ts';
import { AppError } from './app-error.ts';
import { contextOf } from './request-context.ts';
import type { Context } from './context.ts';
import { presentAs, validate } from './validate.ts';

/** What the five steps hand on: the parsed request and nothing else of it. */
export interface Input<Params, Query, Body> {
  params: Params;
  query: Query;
  body: Body;
  /** The file, on routes that take an upload. */
  upload: Buffer;
}

/** Context of a route that needs sign-in: there is a person in it. */
export type SignedInContext = Context & { user: User };

export interface RouteSpec<Params, Query, Body, Subject, Result, Shape extends z.ZodType> {
  method: 'get' | 'post' | 'put' | 'delete';
  /** Express path; parameters are parsed by `params`. */
  path: `/api/${string}`;
  /** One sentence for the list of routes. */
  summary: string;
  /** Who may; `anyone` and `signedIn` are explicit choices. */
  permission: Permission<Subject>;
  params?: z.ZodType<Params>;
  query?: z.ZodType<Query>;
  body?: z.ZodType<Body>;
  /** A file as the request's body instead of JSON. */
  upload?: { mediaTypes: string[]; maximumBytes: number };
  /** Loads what the permission is about. Throws `not-found` for what may not be known. */
  subject?: (context: SignedInContext, input: Input<Params, Query, Body>) => Promise<Subject>;
  act: (context: SignedInContext, input: Input<Params, Query, Body>, subject: Subject) => Promise<Result>;
  /** The reply's shape. A reply that does not fit it is a defect of ours. */
  response: Shape;
  present: (result: Result, context: SignedInContext, subject: Subject) => z.input<Shape>;
  /** A large reply whose presenter writes every field in its final form: in production a sample of them is checked. */
  isLarge?: true;
  status?: 200 | 201;
  /** The address of what was made, for the Location header. */
  location?: (result: Result) => string;
  /** Replies that are not JSON (a document's bytes). Used instead of `present`'s value. */
  send?: (result: Result, response: Response) => void;
}

/** A declared route: its description, and the handlers that Express runs. */
export interface Route {
  method: RouteSpec<unknown, unknown, unknown, unknown, unknown, z.ZodType>['method'];
  path: string;
  summary: string;
  permissionName: string;
  isPublic: boolean;
  takesBody: boolean;
  handlers: RequestHandler[];
}

/** In production one large reply in so many is checked against its contract, the first among them. */
const REPLIES_PER_SAMPLE = 50;

/**
 * Declares a route in five words, always in this order: authenticate, validate, authorize, act, present.
 * Parsed input arrives as an argument; nothing downstream touches the Express request.
 */
export function route<
  Shape extends z.ZodType,
  Result,
  Params = unknown,
  Query = unknown,
  Body = unknown,
  Subject = void,
>(spec: RouteSpec<Params, Query, Body, Subject, Result, Shape>): Route {
  let replies = 0;
  const isTrusted = (context: Context) =>
    spec.isLarge === true && !context.checksEveryReply && replies++ % REPLIES_PER_SAMPLE !== 0;
  const handler: RequestHandler = async (request, response) => {
    const context = authenticate(contextOf(request), spec.permission.isPublic);
    const input: Input<Params, Query, Body> = {
      params: validate(spec.params, request.params, 'params'),
      query: validate(spec.query, request.query, 'query'),
      body: validate(spec.body, request.body, 'body'),
      upload: Buffer.isBuffer(request.body) ? request.body : Buffer.alloc(0),
    };
    const subject = spec.subject ? await spec.subject(context, input) : (undefined as Subject);
    if (!spec.permission.isPublic) authorize(context.user, spec.permission, subject);
    const result = await spec.act(context, input, subject);
    if (spec.send) {
      spec.send(result, response);
      return;
    }
    const presented = spec.present(result, context, subject);
    const reply = isTrusted(context) ? presented : presentAs(spec.response, presented);
    if (spec.location) response.location(spec.location(result));
    response.status(spec.status ?? 200).json(reply);
  };
  const handlers = spec.upload ? [uploadParser(spec.upload), handler] : [handler];
  return {
    method: spec.method,
    path: spec.path,
    summary: spec.summary,
    permissionName: spec.permission.name,
    isPublic: spec.permission.isPublic,
    takesBody: spec.body !== undefined || spec.upload !== undefined,
    handlers,
  };
}

function authenticate(context: Context, isPublic: boolean): SignedInContext {
  if (!context.user && !isPublic) throw new AppError('not-signed-in', 'This needs a signed-in account.');
  // On public routes `user` may be null; their acts do not read it.
  return context as SignedInContext;
}

/** Refuses before reading: a stranger's bytes are never taken in, nor a kind of file that is not kept. */
function uploadParser(upload: { mediaTypes: string[]; maximumBytes: number }): RequestHandler {
  const parse = raw({ type: upload.mediaTypes, limit: upload.maximumBytes });
  return (request, response, next) => {
    authenticate(contextOf(request), false);
    if (!request.is(upload.mediaTypes)) {
      throw new AppError('wrong-media-type', `Send one of ${upload.mediaTypes.join(', ')} as the body.`);
    }
    parse(request, response, next);
  };
}
