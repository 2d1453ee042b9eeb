import type { ErrorRequestHandler } from 'express';
import type { Logger } from 'pino';
import { ERRORS, type ErrorId } from '#shared/errors.ts';
import { asAppError } from '#server/db/db-errors.ts';
import { AppError } from './app-error.ts';
import { contextOf } from './request-context.ts';

/** The only place that turns an error into a reply: problem details after RFC 9457, unknown errors masked. */
export function errorHandler(logger: Logger): ErrorRequestHandler {
  return (thrown: unknown, request, response, next) => {
    const error = foreseen(thrown);
    const requestId = safeRequestId(request);
    if (error.isReportable) logger.error({ err: thrown, requestId, path: request.path }, error.message);
    if (response.headersSent) {
      next(thrown);
      return;
    }
    response
      .status(error.status)
      .type('application/problem+json')
      .json({
        type: `/problems/${error.id}`,
        title: ERRORS[error.id].title,
        status: error.status,
        detail: error.message,
        instance: requestId,
        ...(error.fields ? { fields: error.fields } : {}),
        ...error.members,
      });
  };
}

function safeRequestId(request: Parameters<ErrorRequestHandler>[1]): string {
  try {
    return contextOf(request).requestId;
  } catch {
    return 'unknown';
  }
}

/** Errors of Express's own parsers carry a type; everything not foreseen is one masked 500. */
function foreseen(thrown: unknown): AppError {
  if (thrown instanceof AppError) return thrown;
  const fromDatabase = asAppError(thrown);
  if (fromDatabase) return fromDatabase;
  const id = parserErrorId(thrown);
  if (id) return new AppError(id, (thrown as Error).message, { isReportable: false });
  return new AppError(
    'internal',
    'The server failed; nothing was saved. The operator can find it by the instance.',
    {
      cause: thrown,
    },
  );
}

function parserErrorId(thrown: unknown): ErrorId | null {
  if (!(thrown instanceof Error) || !('status' in thrown) || typeof thrown.status !== 'number') return null;
  if (thrown.status === 413) return 'too-large';
  if (thrown.status === 415) return 'wrong-media-type';
  if (thrown.status === 404) return 'not-found';
  return thrown.status >= 400 && thrown.status < 500 ? 'malformed' : null;
}
