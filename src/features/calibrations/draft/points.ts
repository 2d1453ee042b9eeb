import { get as valueAt } from 'react-hook-form';
import type { DraftResponse, OpenPoint } from '#shared/contracts/drafts.ts';
import { isSameValue } from './same-value.ts';
import type { DraftValues } from './draft-values.ts';

/** What a point says in one line: what is wrong, what is wanted where the message does not say it, and the clause. */
export function pointLine({ message, expected, clause, kind }: OpenPoint): string {
  const sentence = message.replace(/[.\s]*$/, '');
  const wanted = expected && kind !== 'missing' ? `; expected ${expected}` : '';
  return `${sentence}${wanted}${clause ? ` (${clause})` : ''}.`;
}

/**
 * The points that still speak of what stands in the form. A point about a field that was changed since is left
 * out until the server has read the new entry.
 */
export function currentPoints(draft: DraftResponse | null, values: DraftValues): OpenPoint[] {
  if (!draft) return [];
  return draft.points.filter(({ field }) =>
    isSameValue(valueAt(values, field), valueAt(draft.content, field)),
  );
}

/** Whether a point keeps the draft from being issued. */
export function isBlocking({ kind }: OpenPoint): boolean {
  return kind !== 'note';
}
