/**
 * Every failure the product names. The id is stable: it is the last segment of the problem type
 * (`/problems/<id>`) and what a program tests against. Status and title belong to the id, the detail to the case.
 */
export const ERRORS = {
  malformed: { status: 400, title: 'The request is not as described' },
  'not-signed-in': { status: 401, title: 'Sign in first' },
  'sign-in-refused': { status: 401, title: 'E-mail or password not accepted' },
  'not-permitted': { status: 403, title: 'Not permitted' },
  'foreign-origin': { status: 403, title: 'The request did not come from the application' },
  'not-found': { status: 404, title: 'Not found' },
  stale: { status: 409, title: 'Changed by someone else meanwhile' },
  duplicate: { status: 409, title: 'Already in the register' },
  'too-large': { status: 413, title: 'Too large' },
  'wrong-media-type': { status: 415, title: 'Not a kind of file that is kept here' },
  unprocessable: { status: 422, title: 'Not possible as it stands' },
  'too-many-requests': { status: 429, title: 'Too many attempts' },
  internal: { status: 500, title: 'The server failed' },
  unavailable: { status: 503, title: 'Not ready' },
} as const;

export type ErrorId = keyof typeof ERRORS;

/** What is wrong with one field: what came, what is wanted, and where that is laid down. */
export interface FieldProblem {
  message: string;
  received?: string;
  expected?: string;
  clause?: string;
}

export type FieldProblems = Record<string, FieldProblem>;
