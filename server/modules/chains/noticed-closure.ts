import { noticeEntries } from '#shared/engine/network/notice-entries.ts';
import { broughtTo, type Brought } from '#shared/notices/brought-to.ts';
import type { Notice } from '#shared/notices/notice.ts';
import { noticesInForce } from '#shared/notices/in-force.ts';
import type { ChainStore, Closure } from './chain-store.ts';
import type { StoredLink, StoredSource, StoredSourceLink, StoredValue } from './stored.ts';

const GRAMS_PER_KILOGRAM = 1000;

/** What one notice brings to a value, its own and inherited. Grams. */
export interface NoticeEffect {
  notice: Notice;
  shift: number;
  /** Standard uncertainty: one effect, shared by every value it reaches. */
  u: number;
}

/** Where a notice enters a chain. */
export interface NoticeEntry {
  value: StoredValue;
  shift: number;
  /** Standard uncertainty, signed, grams. */
  u: number;
}

/**
 * Where each notice enters the values of a closure: on the oldest covered ones, once per path.
 * @param inForce in the order in which they take effect
 */
export function entriesOf(closure: Closure, inForce: readonly Notice[]): Map<Notice, NoticeEntry[]> {
  const byNotice = coveredBy(closure, inForce);
  const byId = new Map(closure.values.map((value) => [value.id, value]));
  const parentsOf = (value: StoredValue) =>
    value.parents
      .filter(passes)
      .map(({ parentId, sensitivity }) => ({ parent: byId.get(parentId)!, sensitivity }));
  const found = new Map<Notice, NoticeEntry[]>();
  for (const [notice, covered] of byNotice) {
    const masses = new Map([...covered.keys()].map((value) => [value, kilograms(value)]));
    const parts = noticeEntries(closure.values, parentsOf, masses);
    found.set(
      notice,
      [...parts].map(([value, part]) => {
        const { shift, addedU } = covered.get(value)!;
        return { value, shift: part * shift.toNumber(), u: part * addedU };
      }),
    );
  }
  return found;
}

/**
 * The closure with each notice in force as one shared source on the values where it enters: u, shares and the drawing
 * then count it as they count any source. Without notices that touch it, the closure itself.
 */
export function withNotices(closure: Closure, inForce: readonly Notice[]): Closure {
  const entries = entriesOf(closure, inForce);
  if (entries.size === 0) return closure;
  const sources = new Map(closure.sources);
  const added = new Map<StoredValue, StoredSourceLink[]>();
  // Ids below zero: a notice is no row of the table of sources.
  [...entries].forEach(([notice, at], index) => {
    const sourceId = -1 - index;
    const u = Math.max(...notice.terms.map((term) => term.addedU));
    sources.set(sourceId, sourceOf(notice, sourceId, u));
    for (const entry of at) {
      const sensitivity = u === 0 ? kilograms(entry.value) : entry.u / u;
      added.set(entry.value, [...(added.get(entry.value) ?? []), { sourceId, sensitivity }]);
    }
  });
  const values = closure.values.map((value) => {
    const links = added.get(value);
    return links ? { ...value, sources: [...value.sources, ...links] } : value;
  });
  return { values, sources, groups: closure.groups };
}

/** The values with these ids and all they lean on, with the notices in force on a day as known on that day. */
export async function closureOn(store: ChainStore, ids: readonly number[], day: string): Promise<Closure> {
  return withNotices(await store.closure(ids), noticesInForce(store.notices, day, day));
}

/**
 * What the notices in force bring to each value of a closure, by uid: their shifts and standard uncertainties at that
 * value, in the order in which they take effect. A shift does not pass a link whose child used the corrected value.
 */
export function noticeShifts(closure: Closure, inForce: readonly Notice[]): Map<string, NoticeEffect[]> {
  const effects = new Map<string, NoticeEffect[]>();
  for (const [notice, entries] of entriesOf(closure, inForce)) {
    const isApplied = (link: StoredLink) => usedByNotice(link, notice);
    const shifts = handedDown(closure, entries, 'shift', (link) => passes(link) && !isApplied(link));
    const us = handedDown(closure, entries, 'u', passes);
    for (const value of closure.values) {
      const [shift, u] = [shifts.get(value.id) ?? 0, Math.abs(us.get(value.id) ?? 0)];
      if (!shifts.has(value.id) && !us.has(value.id)) continue;
      effects.set(value.uid, [...(effects.get(value.uid) ?? []), { notice, shift, u }]);
    }
  }
  return effects;
}

/** What enters at some values, at every value below them that it reaches, by id. */
export function handedDown(
  closure: Closure,
  entries: readonly NoticeEntry[],
  what: 'shift' | 'u',
  reaches: (link: StoredLink, child: StoredValue) => boolean,
): Map<number, number> {
  const amounts = new Map<number, number>();
  const entering = new Map(entries.map((entry) => [entry.value.id, entry[what]]));
  for (const value of closure.values) {
    let amount = entering.get(value.id);
    for (const link of value.parents) {
      const above = amounts.get(link.parentId);
      if (above !== undefined && reaches(link, value)) amount = (amount ?? 0) + link.sensitivity * above;
    }
    if (amount !== undefined) amounts.set(value.id, amount);
  }
  return amounts;
}

/** Whether what a reference brings reaches the child: not through a class limit, where the nominal was used. */
export function passes(link: StoredLink): boolean {
  return link.role === 'reference' && link.usedAs !== 'class limit';
}

/** Whether the child used the value that this notice corrects: known by then, and in force. */
export function usedByNotice(link: StoredLink, notice: Notice): boolean {
  return (
    link.usedAs === 'by notice' && notice.madeKnownOn <= link.usedEnd && notice.effectiveOn <= link.usedEnd
  );
}

function coveredBy(closure: Closure, inForce: readonly Notice[]): Map<Notice, Map<StoredValue, Brought>> {
  const found = new Map<Notice, Map<StoredValue, Brought>>();
  if (inForce.length === 0) return found;
  const issuers = new Set(inForce.map((notice) => notice.issuerId));
  for (const value of closure.values) {
    if (!issuers.has(value.issuerId)) continue;
    for (const brought of broughtTo(value, inForce)) {
      const covered = found.get(brought.notice) ?? new Map<StoredValue, Brought>();
      found.set(brought.notice, covered.set(value, brought));
    }
  }
  // In the order of the notices, not of the values that met them first.
  return new Map(
    inForce.flatMap((notice) => {
      const covered = found.get(notice);
      return covered ? [[notice, covered] as const] : [];
    }),
  );
}

function sourceOf(notice: Notice, id: number, u: number): StoredSource {
  return {
    id,
    uid: notice.id,
    kind: 'scale version',
    name: `${notice.number}, ${notice.title}`,
    u,
    unit: 'g',
    isPublished: true,
    degreesOfFreedom: null,
    estimate: null,
    standardId: null,
    registryNo: null,
    laboratoryId: notice.issuerId,
    determinedOn: notice.effectiveOn,
  };
}

function kilograms(value: StoredValue): number {
  return Number(value.nominal) / GRAMS_PER_KILOGRAM;
}
