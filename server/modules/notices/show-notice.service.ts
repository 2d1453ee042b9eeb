import { Decimal } from '#shared/decimal.ts';
import { broughtTo, type Brought } from '#shared/notices/brought-to.ts';
import { noticesInForce } from '#shared/notices/in-force.ts';
import type { Notice } from '#shared/notices/notice.ts';
import { notFound } from '#server/http/app-error.ts';
import { today, type Context } from '#server/http/context.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { recordedNotices } from '#server/modules/chains/index.ts';
import { noticeEffects, type CoveringNotice, type NoticeEffects } from '#server/modules/downstream/index.ts';
import {
  noticeHeads,
  valuesIssuedBy,
  type CoverableRow,
  type NoticeHead,
  type Reach,
} from './notices.queries.ts';

const GRAMS_PER_KILOGRAM = 1000;

export interface Notices {
  heads: NoticeHead[];
  recorded: Notice[];
}

export interface ShownNotice extends Notices {
  notice: Notice;
  effects: NoticeEffects;
}

/** Every notice as told and as reckoned with. */
export async function allNotices(context: SignedInContext): Promise<Notices> {
  const [heads, recorded] = await Promise.all([
    noticeHeads(context.database),
    recordedNotices(context.database),
  ]);
  return { heads, recorded };
}

/**
 * One notice, with what it brings to the values that this person may see: after those that took effect before it.
 * @throws AppError `not-found`
 */
export async function showNotice(
  context: SignedInContext,
  noticeId: string,
  page: { cursor?: string | undefined; limit: number },
): Promise<ShownNotice> {
  const notices = await allNotices(context);
  const notice = notices.recorded.find(({ id }) => id === noticeId);
  if (!notice) throw notFound('This notice');
  const inForce = noticesInForce(notices.recorded, notice.effectiveOn, today(context));
  const counted = inForce
    .slice(0, inForce.indexOf(notice) + 1)
    .filter(({ issuerId }) => issuerId === notice.issuerId);
  const values =
    counted.length === 0 ? [] : await valuesIssuedBy(context.database, notice.issuerId, reachOf(counted));
  const covering = coverageOf(values, counted);
  const effects = await noticeEffects(
    context,
    {
      notice: covering.get(notice) ?? bare(notice),
      earlier: [...covering].flatMap(([earlier, covered]) => (earlier === notice ? [] : [covered])),
    },
    page,
  );
  return { ...notices, notice, effects };
}

/** Notices not replaced that take effect on a day or later, the newest first, as known today. */
export async function noticesSince(context: Context, since: string): Promise<NoticeHead[]> {
  const heads = await noticeHeads(context.database);
  const replaced = new Set(heads.map(({ replacesId }) => replacesId));
  return heads.filter(({ id, effectiveOn }) => effectiveOn >= since && !replaced.has(id)).reverse();
}

/** Of the values that this person's laboratories hold, how many a notice gives each word; by place in `WORDS`. */
export async function ownWordsOf(
  context: SignedInContext,
  noticeId: string,
): Promise<NoticeEffects['heldWords']> {
  return (await showNotice(context, noticeId, { limit: 1 })).effects.heldWords;
}

type Covering = CoveringNotice & { covered: CoveringNotice['covered'][number][] };

/** From the first to the last of what the terms of some notices reach. */
function reachOf(notices: readonly Notice[]): Reach {
  const terms = notices.flatMap((notice) => notice.terms);
  const furthest = <T>(bounds: readonly (T | null)[], isFurther: (a: T, b: T) => boolean): T | null =>
    bounds.reduce((found, bound) =>
      found === null || bound === null ? null : isFurther(bound, found) ? bound : found,
    );
  const isLighter = (a: string, b: string) => new Decimal(a).lt(b);
  return {
    performedFrom: furthest(
      terms.map((term) => term.performedFrom),
      (a, b) => a < b,
    ),
    performedTo: furthest(
      terms.map((term) => term.performedTo),
      (a, b) => a > b,
    ),
    nominalFrom: furthest(
      terms.map((term) => term.nominalFrom),
      isLighter,
    ),
    nominalTo: furthest(
      terms.map((term) => term.nominalTo),
      (a, b) => isLighter(b, a),
    ),
  };
}

/** Of each notice the values it covers: with those of other institutes it has none in common. */
function coverageOf(values: readonly CoverableRow[], inForce: readonly Notice[]): Map<Notice, Covering> {
  const found = new Map<Notice, Covering>();
  for (const value of values) {
    for (const brought of broughtTo(value, inForce)) {
      const covering = found.get(brought.notice) ?? bare(brought.notice);
      found.set(brought.notice, covering);
      covering.covered.push(coveredValue(value, brought));
    }
  }
  return found;
}

function coveredValue(value: CoverableRow, { shift, addedU }: Brought): Covering['covered'][number] {
  const kilograms = Number(value.nominal) / GRAMS_PER_KILOGRAM;
  return { id: value.id, shift: shift.toNumber(), addedU, kilograms };
}

function bare({ effectiveOn, madeKnownOn }: Notice): Covering {
  return { effectiveOn, madeKnownOn, covered: [] };
}
