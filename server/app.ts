import express, { type Express, type RequestHandler } from 'express';
import helmet from 'helmet';
import type { Logger } from 'pino';
import { pinoHttp } from 'pino-http';
import type { Sequelize } from 'sequelize';
import { makePassport } from '#server/auth/passport.ts';
import { sessionStore } from '#server/auth/session.ts';
import { sessionControl } from '#server/auth/sign-in.ts';
import { AppError } from '#server/http/app-error.ts';
import { systemClock, type Clock } from '#server/http/context.ts';
import { errorHandler } from '#server/http/error-handler.ts';
import { requestContext, userIntoContext } from '#server/http/request-context.ts';
import { sameOrigin } from '#server/http/same-origin.ts';
import { routes } from '#server/routes.ts';

export interface AppParts {
  database: Sequelize;
  logger: Logger;
  sessionSecret: string;
  isBehindTls: boolean;
  /** Where documents are kept. */
  dataDir: string;
  clock?: Clock;
  /** Serves the client: built files in production, Vite in development, nothing in API tests. */
  client?: RequestHandler[];
  isDevelopment?: boolean;
  /** False in production only, where large replies are checked by sample. */
  checksEveryReply?: boolean;
}

export interface App {
  express: Express;
  /** Stops timers that would keep the process alive. */
  close(): void;
}

/**
 * Puts the application together without listening, so that tests use the real one. The order is the way of
 * a request: protection, log, context, body, session, person, origin, routes, client, errors.
 */
export function createApp(parts: AppParts): App {
  const clock = parts.clock ?? systemClock;
  const app = express();
  app.disable('x-powered-by');
  // Replies are never stored (below), so nobody would ask by their tag; the built files have tags of their own.
  app.disable('etag');
  if (parts.isBehindTls) app.set('trust proxy', 1);
  const sessions = sessionStore(parts.database, parts.sessionSecret, parts.isBehindTls);
  const passport = makePassport(parts.database, clock);

  app.use(helmet(protection(parts)));
  app.use(
    pinoHttp({
      logger: parts.logger,
      autoLogging: { ignore: isQuiet },
      // No headers: a session's cookie in a log is a key in a drawer.
      serializers: {
        req: ({ id, method, url }: Record<string, unknown>) => ({ id, method, url }),
        res: ({ statusCode }: Record<string, unknown>) => ({ statusCode }),
      },
    }),
  );
  const { dataDir, checksEveryReply = true } = parts;
  app.use(requestContext(parts.database, { clock, dataDir, checksEveryReply }));
  app.use(
    '/api',
    noStore,
    express.json({ limit: '1mb' }),
    sessions.middleware,
    passport.initialize(),
    passport.session(),
  );
  app.use('/api', userIntoContext, sessionControl(passport, clock), sameOrigin);
  for (const route of routes) app[route.method](route.path, ...route.handlers);
  app.use('/api', () => {
    throw new AppError('not-found', 'There is no such address in the programming interface.');
  });
  for (const handler of parts.client ?? []) app.use(handler);
  app.use(errorHandler(parts.logger));
  return { express: app, close: () => sessions.close() };
}

/** Not in the log: the page's own files, and a monitor that asks every few seconds whether all is well. */
function isQuiet(request: { url?: string | undefined }): boolean {
  return !request.url?.startsWith('/api') || request.url.startsWith('/api/health');
}

const noStore: RequestHandler = (_request, response, next) => {
  response.setHeader('Cache-Control', 'no-store');
  next();
};

/** Strict in the built application; Vite's own client needs inline scripts and a socket in development. */
function protection(parts: AppParts): Parameters<typeof helmet>[0] {
  if (parts.isDevelopment) return { contentSecurityPolicy: false, strictTransportSecurity: false };
  return {
    strictTransportSecurity: parts.isBehindTls,
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        imgSrc: ["'self'", 'blob:'],
        objectSrc: ["'none'"],
        baseUri: ["'none'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
      },
    },
  };
}
