import type { OpenPoint } from '#shared/contracts/drafts.ts';

/** A point for what is not there. */
export function missing(
  field: string,
  message: string,
  expected: string,
  clause: string | null = null,
): OpenPoint {
  return { field, message, received: null, expected, clause, kind: 'missing' };
}

/** A point for what cannot stand as it is. */
export function wrong(
  field: string,
  message: string,
  received: string | null,
  expected: string | null,
): OpenPoint {
  return { field, message, received, expected, clause: null, kind: 'wrong' };
}
