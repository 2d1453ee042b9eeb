import { classLimitOf } from './class-limit.ts';
import type { Closure } from './chain-store.ts';
import type { Fate } from './fate.ts';
import type { StoredLink, StoredValue } from './stored.ts';

/** What became of the values of a chain, by id; a value that stands has no entry. */
export type Fates = ReadonlyMap<number, Fate>;

/**
 * The closure of the focus with each link to a superseded value leading to its successor, as if the successor's
 * certificate had been used. A lost value keeps its place, its own part unknown: nothing below it is computable.
 * @param closure the focus, the successors, and all they lean on
 * @returns null where reading it so closes a circle
 */
export function redirectedClosure(closure: Closure, focusId: number, fates: Fates): Closure | null {
  const asUsed = new Map(closure.values.map((value) => [value.id, value]));
  const byId = new Map(closure.values.map((value) => [value.id, redirected(value, asUsed, fates)]));
  const values = parentsFirst(byId, focusId);
  if (!values) return null;
  const sourceIds = new Set(values.flatMap((value) => value.sources.map((link) => link.sourceId)));
  const groupIds = new Set(values.flatMap((value) => (value.groupId === null ? [] : [value.groupId])));
  return {
    values,
    sources: new Map([...closure.sources].filter(([id]) => sourceIds.has(id))),
    groups: new Map([...closure.groups].filter(([id]) => groupIds.has(id))),
  };
}

/** Where a link leads as now known. */
export function standsFor(link: StoredLink, fates: Fates): number {
  const fate = fates.get(link.parentId);
  return fate?.kind === 'replaced' ? fate.byId : link.parentId;
}

function redirected(value: StoredValue, asUsed: ReadonlyMap<number, StoredValue>, fates: Fates): StoredValue {
  const isLost = fates.get(value.id)?.kind === 'lost';
  const isMoved = value.parents.some((link) => standsFor(link, fates) !== link.parentId);
  if (!isLost && !isMoved) return value;
  const links = value.parents.map((link) => asOfSuccessor(link, asUsed.get(link.parentId)!, fates));
  return {
    ...value,
    // Out of its group too: a group's covariance would stand for the part that is unknown now.
    ...(isLost && { localU: null, groupId: null }),
    parents: isMoved ? merged(links) : value.parents,
  };
}

function asOfSuccessor(link: StoredLink, parent: StoredValue, fates: Fates): StoredLink {
  const parentId = standsFor(link, fates);
  if (parentId === link.parentId) return link;
  if (link.usedAs !== 'class limit') {
    return { ...link, parentId, usedDeviation: null, usedExpandedU: null, usedK: null };
  }
  // The limit stays the one that was used, whatever class the new certificate names.
  const limit = classLimitOf(parent, link);
  return { ...link, parentId, usedExpandedU: limit && limit.toFixed(), usedK: String(Math.sqrt(3)) };
}

/** Two revisions of one certificate may have been used: what took their place is one reference. */
function merged(links: StoredLink[]): StoredLink[] {
  const byKey = new Map<string, StoredLink>();
  for (const link of links) {
    const key = `${link.parentId} ${link.role} ${link.usedAs === 'class limit'}`;
    const same = byKey.get(key);
    byKey.set(key, same ? together(same, link) : link);
  }
  return [...byKey.values()];
}

function together(one: StoredLink, other: StoredLink): StoredLink {
  return {
    ...one,
    sensitivity: one.sensitivity + other.sensitivity,
    usedBegin: one.usedBegin < other.usedBegin ? one.usedBegin : other.usedBegin,
    usedEnd: one.usedEnd > other.usedEnd ? one.usedEnd : other.usedEnd,
  };
}

function parentsFirst(byId: ReadonlyMap<number, StoredValue>, focusId: number): StoredValue[] | null {
  const done = new Set<number>();
  const under = new Set<number>();
  const ordered: StoredValue[] = [];
  const visit = (id: number): boolean => {
    if (done.has(id)) return true;
    if (under.has(id)) return false;
    under.add(id);
    const value = byId.get(id)!;
    if (!value.parents.every((link) => visit(link.parentId))) return false;
    under.delete(id);
    done.add(id);
    ordered.push(value);
    return true;
  };
  return visit(focusId) ? ordered : null;
}
