import type { NoticeFacts, ScaleMapFacts } from '#shared/rules/facts.ts';
import { noticeOn, noticesInForce } from '#shared/notices/in-force.ts';
import { covers, shiftOn } from '#shared/notices/brought-to.ts';
import type { Notice } from '#shared/notices/notice.ts';
import { endOfDay } from '#shared/state-at.ts';
import type { Closure } from './chain-store.ts';
import { entriesOf, handedDown, passes, usedByNotice } from './noticed-closure.ts';
import type { StoredLink, StoredValue } from './stored.ts';

const GRAMS_PER_KILOGRAM = 1000;

/** Notices that bear on values as they were used, by `linkKey`. */
export type NoticesOfLinks = Map<string, NoticeFacts[]>;

const NONE: NoticesOfLinks = new Map();

/**
 * The notices in force when a reference was used that its certificate leaves out, link by link. What a link should
 * have counted is not asked again of the links below it: it arises once.
 */
export function noticesOfLinks(closure: Closure, all: readonly Notice[], known: string): NoticesOfLinks {
  const recorded = recordedBy(all, known);
  if (recorded.length === 0) return NONE;
  const found: NoticesOfLinks = new Map();
  for (const notice of recorded) {
    const entries = entriesOf(closure, noticesInForce(recorded, notice.effectiveOn, known)).get(notice);
    if (!entries) continue;
    const isDue = (link: StoredLink) => noticeOn(notice, recorded, link.usedEnd, known) === 'in force';
    const isLeft = (link: StoredLink) => passes(link) && !isDue(link) && !usedByNotice(link, notice);
    const shifts = handedDown(closure, entries, 'shift', isLeft);
    const us = handedDown(closure, entries, 'u', isLeft);
    for (const child of closure.values) {
      for (const link of child.parents) {
        if (link.role !== 'reference' || !us.has(link.parentId) || !isDue(link)) continue;
        const key = linkKey(child, link);
        const { number, title, effectiveOn, madeKnownOn } = notice;
        const amounts = { shift: shifts.get(link.parentId) ?? 0, u: Math.abs(us.get(link.parentId)!) };
        found.set(key, [...(found.get(key) ?? []), { number, title, effectiveOn, madeKnownOn, ...amounts }]);
      }
    }
  }
  return found;
}

/** Key of a link in `NoticesOfLinks`. */
export function linkKey(child: { uid: string }, link: { parentId: number }): string {
  return `${child.uid} ${link.parentId}`;
}

/**
 * The notices on record that take the reference's scale version to the result's, or back; null where none do, or where
 * one of the two is not stated. Without amounts where the scale is the same.
 */
export function scaleMapOf(
  parent: StoredValue,
  childScale: string | null,
  all: readonly Notice[],
  known: string,
): ScaleMapFacts | null {
  if (parent.scaleVersion === null || childScale === null) return null;
  if (parent.scaleVersion === childScale) return { notices: [], shift: 0, u: 0 };
  const recorded = recordedBy(all, known);
  const way =
    wayBetween(parent.scaleVersion, childScale, recorded) ??
    wayBetween(childScale, parent.scaleVersion, recorded);
  if (!way) return null;
  const kilograms = Number(parent.nominal) / GRAMS_PER_KILOGRAM;
  const terms = way.flatMap((notice) => notice.terms.find((term) => covers(term, parent)) ?? []);
  const shift = terms.reduce((sum, term) => sum + shiftOn(term.shifts, parent.performedEnd).toNumber(), 0);
  const u = Math.hypot(...terms.map((term) => term.addedU));
  return { notices: way.map((notice) => notice.number), shift: kilograms * shift, u: kilograms * u };
}

/** Notices one after the other from scale to scale, the fewest; null where they do not lead there. */
function wayBetween(from: string, to: string, notices: readonly Notice[]): Notice[] | null {
  const ways = new Map<string, Notice[]>([[from, []]]);
  // The map grows while it is walked: each scale reached is left in its turn.
  for (const [scale, way] of ways) {
    if (scale === to) return way;
    for (const notice of notices) {
      if (notice.fromScale !== scale || notice.toScale === null || ways.has(notice.toScale)) continue;
      ways.set(notice.toScale, [...way, notice]);
    }
  }
  return null;
}

function recordedBy(all: readonly Notice[], known: string): Notice[] {
  const horizon = endOfDay(known);
  return all.filter((notice) => notice.recordedAt <= horizon);
}
