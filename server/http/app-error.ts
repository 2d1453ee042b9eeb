import { ERRORS, type ErrorId, type FieldProblem, type FieldProblems } from '#shared/errors.ts';

interface Extras {
  fields?: FieldProblems;
  /** More members of the problem document, for example both versions of a conflict. */
  members?: Record<string, unknown>;
  /** Whether this is news for the operator's log. */
  isReportable?: boolean;
  cause?: unknown;
}

/** A failure the product foresaw. The error handler turns it into a problem document (RFC 9457). */
export class AppError extends Error {
  readonly id: ErrorId;
  readonly status: number;
  readonly fields: FieldProblems | undefined;
  readonly members: Record<string, unknown> | undefined;
  readonly isReportable: boolean;

  constructor(id: ErrorId, detail: string, extras: Extras = {}) {
    super(detail, { cause: extras.cause });
    this.name = 'AppError';
    this.id = id;
    this.status = ERRORS[id].status;
    this.fields = extras.fields;
    this.members = extras.members;
    this.isReportable = extras.isReportable ?? this.status >= 500;
  }
}

/** 404, also for what exists but may not be known to this reader. */
export function notFound(what: string): AppError {
  return new AppError('not-found', `${what} is not in the register, or is not yours to see.`);
}

/** 422 about one field: a rule of the domain that a well-formed value breaks. */
export function fieldError(path: string, problem: FieldProblem): AppError {
  return new AppError('unprocessable', problem.message, { fields: { [path]: problem } });
}

/** 409 for a write that started from an older version: carries the version the server holds. */
export function staleVersion(current: unknown): AppError {
  return new AppError(
    'stale',
    'Someone saved a newer version. Compare the two and save again what should stand.',
    {
      members: { current },
    },
  );
}
