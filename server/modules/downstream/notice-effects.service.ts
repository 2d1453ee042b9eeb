import type { ClassVerdict } from '#shared/contracts/downstream.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { below, type Below } from './below.ts';
import { judgeClassOf } from './class-verdict.ts';
import { consequenceOf, dryRun, type DryRun } from './dry-run.ts';
import { effectsOf, type Effects, type GraphChange } from './effects.ts';
import { dayNumber } from './day-number.ts';
import type { GraphArrays } from './graph-arrays.ts';
import { graphBelow } from './graph-memory.ts';
import { inForceOn } from './in-force-on.ts';
import { pageAfter } from './keyset.ts';
import { askedDays } from './question.ts';
import {
  laboratoriesById,
  rowDetails,
  type NamedLaboratory,
  type RowDetails,
} from './row-details.queries.ts';
import { visibleRows } from './rows.ts';
import { SIGHT } from './sight.ts';

/** A notice with the values of its issuer that it covers. Grams. */
export interface CoveringNotice {
  effectiveOn: string;
  madeKnownOn: string;
  covered: readonly { id: number; shift: number; addedU: number; kilograms: number }[];
}

/** One row: what the notice brings, with the earlier ones before it. Grams; NaN for a U that is not stated. */
export interface NoticeFound {
  sight: number;
  details: RowDetails;
  shift: number;
  addedU: number;
  shiftBefore: number;
  expandedU: number;
  expandedUBefore: number;
  expandedUAfter: number;
  classBefore: ClassVerdict;
  classAfter: ClassVerdict;
  word: number;
}

export interface NoticeEffects {
  words: [number, number, number];
  /** Of them the values told in full, and the values that the person's own laboratories hold. */
  fullWords: [number, number, number];
  heldWords: [number, number, number];
  warned: number;
  rows: NoticeFound[];
  nextCursor: string | null;
  laboratories: Map<string, NamedLaboratory>;
}

/** Beyond this part of U a change matters, unless a verdict changes. */
const THRESHOLD = 0.1;

/**
 * What a notice brings to the values that a person may see, before and after side by side. Its weight is cumulative:
 * against the certificate, with the notices that took effect before it.
 * @param earlier those in force when it takes effect, in order
 */
export async function noticeEffects(
  context: SignedInContext,
  { notice, earlier }: { notice: CoveringNotice; earlier: readonly CoveringNotice[] },
  page: { cursor?: string | undefined; limit: number },
): Promise<NoticeEffects> {
  const ids = notice.covered.map(({ id }) => id);
  const graph = await graphBelow(context.database, ids);
  const found = below(graph, new Set(ids.map((id) => graph.nodeOf(id))));
  const before = earlier.map((one) => changeOf(graph, found, one));
  const own = changeOf(graph, found, notice);
  const runs: Runs = {
    all: dryRun(graph, found, { changes: [...before, own], user: context.user, threshold: THRESHOLD }),
    before: effectsOf(graph, found, before),
    own: effectsOf(graph, found, [own]),
  };
  const days = askedDays(context, {});
  const rows = visibleRows(graph, found, {
    sight: runs.all.sight,
    weightsUpTo: SIGHT.issued,
    isRow: (place) =>
      isReached(runs, place) && inForceOn(graph, found.nodes[place]!, days.dayNumber, days.knownNumber),
    isBefore: (a, b) => runs.all.word[a]! > runs.all.word[b]!,
  });
  const laboratories = new Set(context.user.memberships.map(({ laboratoryId }) => laboratoryId));
  const isHeld = (place: number) =>
    laboratories.has(graph.laboratories.at(graph.holder[found.nodes[place]!]!));
  const isFull = (place: number) => runs.all.sight[place] === SIGHT.full;
  const shown = pageAfter(
    rows.map((place) => standing(runs, place, isHeld(place))),
    { order: 'notice', ...page, cursor: page.cursor },
  );
  const details = await rowDetails(
    context.database,
    shown.rows.map(({ id }) => id),
  );
  const judge = judgeClassOf(graph);
  return {
    words: wordsOf(runs, rows),
    fullWords: wordsOf(runs, rows.filter(isFull)),
    heldWords: wordsOf(
      runs,
      rows.filter((place) => isFull(place) && isHeld(place)),
    ),
    warned: rows.filter((place) => !isFull(place)).length,
    rows: shown.rows.map(({ place, id }) => foundRow(runs, place, details.get(id)!, judge)),
    nextCursor: shown.nextCursor,
    laboratories: await laboratoriesById(
      context.database,
      [...details.values()].flatMap(({ holderId, issuerId }) => [holderId, issuerId]),
    ),
  };
}

interface Runs {
  all: DryRun;
  before: Effects;
  own: Effects;
}

/** Covered values outside the part of the graph that is looked at have nothing to say of it. */
function changeOf(graph: GraphArrays, found: Below, notice: CoveringNotice): GraphChange {
  const { effectiveOn, madeKnownOn } = notice;
  return {
    kind: 'notice',
    addedU: 0,
    covered: notice.covered.flatMap(({ id, shift, addedU, kilograms }) => {
      const node = graph.nodeOf(id);
      return node >= 0 && found.placeOf(node) >= 0
        ? [{ node, shift, sensitivity: kilograms, u: addedU }]
        : [];
    }),
    appliedFrom: Math.max(dayNumber(effectiveOn), dayNumber(madeKnownOn)),
  };
}

function isReached({ own }: Runs, place: number): boolean {
  return own.shift[place] !== 0 || own.addedVariance[place]! > 0;
}

function wordsOf({ all }: Runs, places: readonly number[]): [number, number, number] {
  const words: [number, number, number] = [0, 0, 0];
  for (const place of places) words[all.word[place]!]! += 1;
  return words;
}

/** What one's own laboratory holds first, then by the word, then by what is moved for its U. */
function standing(
  { all, own }: Runs,
  place: number,
  isHeld: boolean,
): { place: number; id: number; keys: number[] } {
  const node = all.found.nodes[place]!;
  const size = Math.abs(own.shift[place]!) + Math.sqrt(own.addedVariance[place]!);
  const expandedU = all.graph.expandedU[node]!;
  const part = all.sight[place] === SIGHT.full && expandedU > 0 ? size / expandedU : 0;
  return {
    place,
    id: all.graph.id[node]!,
    keys: [all.sight[place] === SIGHT.full ? (isHeld ? 2 : 1) : 0, all.word[place]!, part],
  };
}

function foundRow(
  { all, before, own }: Runs,
  place: number,
  details: RowDetails,
  judge: ReturnType<typeof judgeClassOf>,
): NoticeFound {
  const then = consequenceOf({ ...all, effects: before }, place, judge);
  const after = consequenceOf(all, place, judge);
  return {
    sight: all.sight[place]!,
    details,
    shift: own.shift[place]!,
    addedU: Math.sqrt(own.addedVariance[place]!),
    shiftBefore: then.shift,
    expandedU: after.expandedU,
    expandedUBefore: then.expandedUAfter,
    expandedUAfter: after.expandedUAfter,
    classBefore: then.after,
    classAfter: after.after,
    word: all.word[place]!,
  };
}
