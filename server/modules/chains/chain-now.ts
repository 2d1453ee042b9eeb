import { Decimal } from '#shared/decimal.ts';
import type { Notice } from '#shared/notices/notice.ts';
import type { Question } from '#shared/rules/facts.ts';
import { chainNumbers, type ChainNumbers } from './chain-numbers.ts';
import type { ChainStore, Closure } from './chain-store.ts';
import { fateOf, type Fate } from './fate.ts';
import { noticeShifts, withNotices, type NoticeEffect } from './noticed-closure.ts';
import { CIRCLE, difference, Moves, type Move } from './moves.ts';
import { redirectedClosure, standsFor, type Fates } from './redirected.ts';
import type { StoredLink, StoredValue } from './stored.ts';

/** A superseded or withdrawn value that something in the chain leans on. */
export interface ReplacedValue {
  value: StoredValue;
  /** What took its place; null: nothing has. */
  by: StoredValue | null;
  /** What that brings to the focus, grams; null where not computable. */
  shift: Decimal | null;
}

/** A chain as now known: what changed above its values since they were certified. */
export interface ChainNow {
  /** The chain with successors in their predecessors' places; as used where reading it so closes a circle. */
  closure: Closure;
  /** Of the closure so read, local parts frozen, notices included; null where nothing was replaced: the chain's own. */
  numbers: ChainNumbers | null;
  fates: Fates;
  moves: Moves;
  /** What the notices in force bring to each value of the closure, by uid, beside its move. */
  notices: ReadonlyMap<string, NoticeEffect[]>;
  /** The focus as its references stand now. */
  focus: Move;
  /** Variance that its chain has gained since it was certified, g2, signed; null where either is not computable. */
  addedVariance: number | null;
  replaced: ReplacedValue[];
}

/**
 * Reads a chain as now known: in force on the day, as known on the knowledge day.
 * @param closure the chain as certified
 * @param inForce notices, in the order in which they take effect
 * @returns null where the focus stands, no certificate above it was superseded or withdrawn, and no notice reaches it
 */
export async function chainNow(
  store: ChainStore,
  closure: Closure,
  focus: StoredValue,
  question: Question,
  inForce: readonly Notice[],
): Promise<ChainNow | null> {
  const found = await withSuccessors(store, closure, focus, question);
  const hasEnded = found.fates.size > 0 || found.ownEnd !== null;
  if (!hasEnded && inForce.length === 0) return null;
  const now = readAsNowKnown(closure, focus, found, inForce);
  return hasEnded || now.notices.has(focus.uid) ? now : null;
}

/**
 * The pure part: every number of the chain as now known.
 * @param closure the chain as certified
 * @param found what became of its values, and the chain with all successors, links as used
 */
export function readAsNowKnown(
  closure: Closure,
  focus: StoredValue,
  found: Successors,
  inForce: readonly Notice[] = [],
): ChainNow {
  const moves = new Moves(found.closure.values, found.fates);
  const redirected = redirectedClosure(found.closure, focus.id, found.fates);
  const because = found.ownEnd ?? (redirected ? null : CIRCLE);
  const now = redirected ?? closure;
  const notices = noticeShifts(now, inForce);
  const isReplaced = found.fates.size > 0;
  const numbers = isReplaced ? chainNumbers(now, focus.uid, withNotices(now, inForce)) : null;
  return {
    closure: now,
    numbers,
    fates: found.fates,
    moves,
    focus: because ? { shift: null, because, isTouched: true } : moves.of(focus),
    notices,
    addedVariance: numbers
      ? gained(chainNumbers(closure, focus.uid), numbers)
      : (notices.get(focus.uid) ?? []).reduce((sum, { u }) => sum + u ** 2, 0),
    replaced: numbers ? replacedValues(found.closure, now, numbers, found.fates) : [],
  };
}

function gained({ propagation: before }: ChainNumbers, { propagation: after }: ChainNumbers): number | null {
  const [was, is] = [before.standardUncertainty, after.standardUncertainty];
  return was === null || is === null ? null : is ** 2 - was ** 2;
}

/** What became of the values of a chain, and the chain widened by all that took their place. */
export interface Successors {
  closure: Closure;
  fates: Fates;
  /** Why the focus itself is lost. */
  ownEnd: string | null;
}

/** The chain, the successors of its values, all those lean on, and the successors of these in turn. */
async function withSuccessors(
  store: ChainStore,
  closure: Closure,
  focus: StoredValue,
  question: Question,
): Promise<Successors> {
  const fates = new Map<number, Fate>();
  let ownEnd: string | null = null;
  const seen = new Set<number>();
  let reached = closure;
  for (;;) {
    const fresh = reached.values.filter((value) => !seen.has(value.id));
    if (fresh.length === 0) return { closure: reached, fates, ownEnd };
    const dossiers = await store.standards(fresh.map((value) => value.standardId));
    for (const value of fresh) {
      seen.add(value.id);
      const fate = fateOf(value, dossiers.get(value.standardId)!, question);
      // The focus is what is asked about: it gives way to nothing, but may be lost itself.
      if (value.id !== focus.id && fate.kind !== 'stands') fates.set(value.id, fate);
      else if (fate.kind === 'lost') ownEnd = fate.because;
    }
    const successors = [...fates.values()].flatMap((fate) => (fate.kind === 'replaced' ? [fate.byId] : []));
    if (successors.every((id) => seen.has(id))) return { closure: reached, fates, ownEnd };
    reached = await store.closure([focus.id, ...successors]);
  }
}

/**
 * The values whose place was taken, or that are lost, where the chain as now known met them: each with what it brings
 * to the focus over every link that leaned on it. Their shifts sum to the focus's.
 */
function replacedValues(all: Closure, now: Closure, numbers: ChainNumbers, fates: Fates): ReplacedValue[] {
  const byId = new Map(all.values.map((value) => [value.id, value]));
  const gains = numbers.propagation.sensitivities;
  const found = new Map<number, ReplacedValue>();
  for (const { id } of now.values.toReversed()) {
    const child = byId.get(id)!;
    for (const link of child.parents) {
      const fate = fates.get(link.parentId);
      if (!fate || link.role !== 'reference') continue;
      const value = byId.get(link.parentId)!;
      const by = fate.kind === 'replaced' ? byId.get(standsFor(link, fates))! : null;
      const brought = by ? broughtOver(link, value, by, gains[child.uid] ?? 0) : null;
      const earlier = found.get(value.id);
      const sum = earlier ? earlier.shift && brought && earlier.shift.plus(brought) : brought;
      found.set(value.id, { value, by, shift: sum });
    }
  }
  return [...found.values()];
}

function broughtOver(link: StoredLink, value: StoredValue, by: StoredValue, gain: number): Decimal {
  if (link.usedAs === 'class limit') return new Decimal(0);
  return difference(value, by).times(link.sensitivity).times(gain);
}
