import type { FieldProblem, FieldProblems } from '#shared/errors.ts';

/** A problem document (RFC 9457) as the server sends it, or one the client makes when no answer came. */
export interface ProblemDocument {
  type: string;
  title: string;
  status: number;
  detail?: string;
  /** The request id, for whoever reads the server's log. */
  instance?: string;
  fields?: FieldProblems;
  /** Further members, for example `current` of a conflict. */
  [member: string]: unknown;
}

/** Every failure of a request, whatever its cause: refused, failed, unreachable or not understood. */
export class ApiProblem extends Error {
  readonly document: ProblemDocument;

  constructor(document: ProblemDocument) {
    super(document.detail ?? document.title);
    this.name = 'ApiProblem';
    this.document = document;
  }

  /** The stable identifier: the last segment of the problem type. */
  get id(): string {
    return this.document.type.split('/').at(-1) ?? '';
  }

  /** HTTP status; 0 when no answer came. */
  get status(): number {
    return this.document.status;
  }

  get title(): string {
    return this.document.title;
  }

  get detail(): string | undefined {
    return this.document.detail;
  }

  get instance(): string | undefined {
    return this.document.instance;
  }

  /** What is wrong with single fields, by path into the body that was sent. */
  get fields(): FieldProblems {
    return this.document.fields ?? {};
  }
}

/** A field's problem in one line: what is wrong, what came, what is wanted, and where that is laid down. */
export function problemLine(problem: FieldProblem): string {
  const asked = problem.expected ? `expected ${problem.expected}` : '';
  const came = problem.received !== undefined ? `received "${problem.received}"` : '';
  const facts = [came, asked].filter((part) => part !== '').join(', ');
  const sentence = problem.message.replace(/[.\s]*$/, '');
  return `${sentence}${facts ? ` (${facts})` : ''}${problem.clause ? `; ${problem.clause}` : ''}.`;
}
