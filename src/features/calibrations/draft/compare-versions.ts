import type { DraftContent, DraftLine } from '#shared/contracts/drafts.ts';
import { isSameValue } from './same-value.ts';

/** Which version a part is taken from. */
export type Side = 'mine' | 'theirs';

/** One part in which two versions of a draft differ. */
export interface Difference {
  /** Stable name: a field of the head, `line:<key>`, or `line:<key>.<field>`. */
  id: string;
  /** The field's name; null for a whole line that only one version has. */
  field: string | null;
  /** The line it belongs to, as it stands in either version. */
  line: DraftLine | null;
  mine: unknown;
  theirs: unknown;
  /** Which one changed since the version both began from, where that is known. */
  suggested: Side;
}

type Head = Omit<DraftContent, 'lines'>;

/**
 * Every part in which two versions differ. A part that I did not change since `base` is suggested from them,
 * everything else from me, since what was typed here is what nobody else has.
 */
export function compareVersions(
  mine: DraftContent,
  theirs: DraftContent,
  base: DraftContent | null,
): Difference[] {
  const found: Difference[] = [];
  const heads = headOf(mine);
  for (const field of Object.keys(heads) as (keyof Head)[]) {
    if (isSameValue(mine[field], theirs[field])) continue;
    const isUntouched = base !== null && isSameValue(mine[field], base[field]);
    const suggested: Side = isUntouched ? 'theirs' : 'mine';
    found.push({ id: field, field, line: null, mine: mine[field], theirs: theirs[field], suggested });
  }
  for (const key of keysOf(mine, theirs)) {
    found.push(
      ...lineDifferences(lineWith(mine, key), lineWith(theirs, key), base && lineWith(base, key), key),
    );
  }
  return found;
}

/** The content that takes each differing part from the side chosen; what is equal in both stays. */
export function mergeVersions(
  mine: DraftContent,
  theirs: DraftContent,
  choose: (difference: Difference) => Side,
): DraftContent {
  const chosen = new Map(compareVersions(mine, theirs, null).map((one) => [one.id, choose(one)]));
  const take = (id: string): DraftContent => (chosen.get(id) === 'theirs' ? theirs : mine);
  const merged: Record<string, unknown> = {};
  for (const field of Object.keys(headOf(mine))) merged[field] = take(field)[field as keyof Head];
  const lines = keysOf(mine, theirs).flatMap((key) => {
    const own = lineWith(mine, key);
    const other = lineWith(theirs, key);
    if (!own || !other) return lineWith(take(`line:${key}`), key) ?? [];
    const line: Record<string, unknown> = { ...own };
    for (const field of Object.keys(own)) {
      if (chosen.get(`line:${key}.${field}`) === 'theirs') line[field] = other[field as keyof DraftLine];
    }
    return line as unknown as DraftLine;
  });
  return { ...(merged as unknown as Head), lines };
}

function lineDifferences(
  mine: DraftLine | null,
  theirs: DraftLine | null,
  base: DraftLine | null,
  key: string,
): Difference[] {
  const line = mine ?? theirs;
  if (!mine || !theirs) {
    const isUntouched = base !== null && mine !== null && isSameValue(mine, base);
    const isNewFromThem = mine === null && base === null;
    const suggested: Side = isUntouched || isNewFromThem ? 'theirs' : 'mine';
    return [{ id: `line:${key}`, field: null, line, mine, theirs, suggested }];
  }
  return (Object.keys(mine) as (keyof DraftLine)[]).flatMap((field) => {
    if (isSameValue(mine[field], theirs[field])) return [];
    const isUntouched = base !== null && isSameValue(mine[field], base[field]);
    const suggested: Side = isUntouched ? 'theirs' : 'mine';
    const id = `line:${key}.${field}`;
    return [{ id, field, line, mine: mine[field], theirs: theirs[field], suggested }];
  });
}

function headOf({ lines: _lines, ...head }: DraftContent): Head {
  return head;
}

function lineWith(content: DraftContent, key: string): DraftLine | null {
  return content.lines.find((line) => line.key === key) ?? null;
}

/** The lines of both, mine in their order, then those that only they have. */
function keysOf(mine: DraftContent, theirs: DraftContent): string[] {
  return [...new Set([...mine.lines, ...theirs.lines].map((line) => line.key))];
}
