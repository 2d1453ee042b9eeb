import { broughtTo, type Brought } from '#shared/notices/brought-to.ts';
import { noticesInForce } from '#shared/notices/in-force.ts';
import type { Notice } from '#shared/notices/notice.ts';
import { notFound } from '#server/http/app-error.ts';
import { today } from '#server/http/context.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { recordedNotices } from '#server/modules/chains/index.ts';
import { noticeEffects, type CoveringNotice, type NoticeEffects } from '#server/modules/downstream/index.ts';
import { noticeHeads, valuesIssuedBy, type CoverableRow, type NoticeHead } from './notices.queries.ts';

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
  const values = await valuesIssuedBy(context.database, notice.issuerId);
  const covering = coverageOf(values, inForce.slice(0, inForce.indexOf(notice) + 1));
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

type Covering = CoveringNotice & { covered: CoveringNotice['covered'][number][] };

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
