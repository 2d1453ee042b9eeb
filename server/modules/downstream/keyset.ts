import { cursorAfter, placeOf } from '#server/http/cursor.ts';
import { AppError } from '#server/http/app-error.ts';

/** Where a row stands in an order: numbers compared one after the other, larger first, then the id, smaller first. */
export interface Standing {
  keys: readonly number[];
  id: number;
}

/** Rows of one page and the cursor of the next. */
export interface Page<Row> {
  rows: Row[];
  nextCursor: string | null;
}

/**
 * A page of rows after the cursor. The cursor holds the place of the last row shown, so that rows which come or go
 * meanwhile neither repeat nor hide others.
 * @param order name of the order and of the group, which a cursor is bound to
 * @throws AppError `malformed` for a cursor of another order
 */
export function pageAfter<Row extends Standing>(
  rows: Iterable<Row>,
  { order, cursor, limit }: { order: string; cursor: string | undefined; limit: number },
): Page<Row> {
  const place = placeOf(cursor, order);
  const after = place ? standingOf(place) : null;
  const left: Row[] = [];
  for (const row of rows) if (!after || compareStandings(after, row) < 0) left.push(row);
  left.sort(compareStandings);
  const shown = left.slice(0, limit);
  const last = shown.at(-1);
  const isMore = left.length > limit && last !== undefined;
  return {
    rows: shown,
    nextCursor: isMore
      ? cursorAfter(order, { value: last.keys.map(String).join(' '), id: String(last.id) })
      : null,
  };
}

function compareStandings(a: Standing, b: Standing): number {
  for (const [at, key] of a.keys.entries()) {
    const other = b.keys[at] ?? 0;
    // Not a difference: two infinite keys are equal, and their difference is no number.
    if (key !== other) return key > other ? -1 : 1;
  }
  return a.id - b.id;
}

function standingOf(place: { value: string; id: string }): Standing {
  const keys = place.value === '' ? [] : place.value.split(' ').map(Number);
  const id = Number(place.id);
  if ([...keys, id].some(Number.isNaN)) {
    const message = 'This place in the list is not one that was given out. Start at the first page.';
    throw new AppError('malformed', message, { fields: { cursor: { message } } });
  }
  return { keys, id };
}
