import { z } from 'zod';
import { AppError } from './app-error.ts';

/** The place after a row: the value it was sorted by, and its id where values repeat. */
export interface Place {
  value: string;
  id: string;
}

const Opaque = z.tuple([z.string(), z.string().max(200), z.string().max(64)]);

/** The next page's cursor: opaque to the client, bound to the order it was made in. */
export function cursorAfter(sort: string, place: Place): string {
  return Buffer.from(JSON.stringify([sort, place.value, place.id])).toString('base64url');
}

/**
 * The place a cursor names; null for the first page.
 * @throws AppError `malformed` for a cursor that was altered, or made in another order
 */
export function placeOf(cursor: string | undefined, sort: string): Place | null {
  if (cursor === undefined) return null;
  const parsed = Opaque.safeParse(decoded(cursor));
  if (parsed.success && parsed.data[0] === sort) return { value: parsed.data[1], id: parsed.data[2] };
  const message =
    'This place in the list is not one that was given out for this order. Start at the first page.';
  throw new AppError('malformed', message, {
    fields: { cursor: { message, received: cursor.slice(0, 80) } },
  });
}

function decoded(cursor: string): unknown {
  try {
    return JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8'));
  } catch {
    return null;
  }
}
