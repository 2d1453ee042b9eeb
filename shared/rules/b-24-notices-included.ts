import { Decimal } from '#shared/decimal.ts';
import { dateText, isBefore, isNotAfter, periodOf } from './days.ts';
import type { LinkFacts, NoticeFacts } from './facts.ts';
import { amountText, certificateText, halfDigit, percentText, statedU } from './numbers.ts';
import {
  cannotBeJudged,
  doesNotApply,
  fails,
  holds,
  type Finding,
  type LinkRule,
  type VerdictName,
} from './rule.ts';

/** Growth of u from which a notice left out is critical; below it is only said. */
const CRITICAL_EFFECT = 0.05;
/** A corrected value that differs from the notice's by this part of its shift is a corrected value all the same. */
const ROUNDED_PART = 0.1;

/**
 * Notices in force when a reference was used are included in the value used. Conduct asks for those made known by
 * then, today for those of later knowledge too. Severity is by the effect on u; a shift left out counts in quadrature,
 * as a bias that is known and not corrected.
 */
export const noticesIncluded: LinkRule = {
  id: 'B-24',
  title: 'Notices in force at use included',
  scope: 'link',
  severity: 'critical',
  verdicts: ['conduct', 'today'],
  sentences: {
    none: 'No notice in force when it was used bears on certificate {reference}.',
    'class limit': '{registryNo} was used by its class limit, which notice {notices} leaves as it is.',
    included: 'The value of {registryNo} was used as corrected by notice {notices}.',
    'left out':
      'Notice {notices} was in force when certificate {reference} was used, until {used}, and the value was taken as printed: with it, u of certificate {certificate} would be {effect} larger. Use the value as corrected by the notice.',
    'otherwise corrected':
      'The value of {registryNo} was used as corrected, but {difference} from what notice {notices} makes of it; u of certificate {certificate} would be {effect} larger.',
    undecided:
      'Notice {notices} takes effect on {effective}; the use is dated {used} only, and the exact day would decide.',
    'no uncertainty':
      'Notice {notices} was left out when certificate {reference} was used; certificate {certificate} states no U to weigh it by.',
  },
  judge(link, _, verdict) {
    const due = link.notices.filter((notice) => isInForce(notice, link, verdict) === true);
    const open = link.notices.filter((notice) => isInForce(notice, link, verdict) === null);
    if (due.length === 0 && open.length === 0) return doesNotApply('none', textsOf(link, due));
    if (link.usedAs === 'class limit') return doesNotApply('class limit', textsOf(link, [...due, ...open]));
    if (due.length === 0) return judgeOpen(link, open);
    return link.usedAs === 'by notice' ? judgeCorrected(link, due) : judgeLeftOut(link, due);
  },
};

function judgeOpen(link: LinkFacts, open: readonly NoticeFacts[]): Finding {
  const parameters = textsOf(link, open);
  return link.usedAs === 'by notice'
    ? holds('included', parameters)
    : cannotBeJudged('undecided', parameters);
}

/** Null where the precision of the day of use cannot decide. What was made known on the day of use came too late. */
function isInForce(notice: NoticeFacts, link: LinkFacts, verdict: VerdictName): boolean | null {
  const precision = link.child.datePrecision;
  const isEffective = isNotAfter(periodOf(notice.effectiveOn, 'day'), periodOf(link.usedEnd, precision));
  if (verdict === 'today' || isEffective === false) return isEffective;
  const isKnown = isBefore(periodOf(notice.madeKnownOn, 'day'), periodOf(link.usedBegin, precision));
  return isKnown === false ? false : isKnown === null || isEffective === null ? null : true;
}

function judgeLeftOut(link: LinkFacts, due: readonly NoticeFacts[]): Finding {
  const shift = due.reduce((sum, notice) => sum + notice.shift, 0);
  const effect = effectOnU(link, { shift, u: Math.hypot(...due.map((notice) => notice.u)) });
  const parameters = textsOf(link, due);
  if (effect === null) return cannotBeJudged('no uncertainty', parameters);
  return fails('left out', { ...parameters, effect: percentText(effect) }, severityOf(effect));
}

function judgeCorrected(link: LinkFacts, due: readonly NoticeFacts[]): Finding {
  const parameters = textsOf(link, due);
  if (link.usedDeviation === null) return holds('included', parameters);
  const shift = due.reduce((sum, notice) => sum.plus(notice.shift), new Decimal(0));
  const difference = new Decimal(link.usedDeviation).minus(link.parent.deviation).minus(shift);
  const allowed = Decimal.max(halfDigit(link.parent), shift.abs().times(ROUNDED_PART));
  if (difference.abs().lte(allowed)) return holds('included', parameters);
  const effect = effectOnU(link, { shift: difference.toNumber(), u: 0 });
  if (effect === null) return cannotBeJudged('no uncertainty', parameters);
  const texts = { difference: amountText(difference.abs(), link.parent), effect: percentText(effect) };
  return fails('otherwise corrected', { ...parameters, ...texts }, severityOf(effect));
}

/**
 * Relative growth of the result's u by what was left out of its reference, a shift in quadrature (GUM F.2.4.5, from
 * memory); null without U.
 */
export function effectOnU(
  { child, sensitivity }: Pick<LinkFacts, 'child' | 'sensitivity'>,
  { shift, u }: { shift: number; u: number },
): number | null {
  const stated = statedU(child);
  if (stated === null || stated === 0) return null;
  return Math.hypot(stated, sensitivity * u, sensitivity * shift) / stated - 1;
}

/** More than 5 % of u is critical; less is information. */
export function severityOf(effect: number): 'critical' | 'information' {
  return effect > CRITICAL_EFFECT ? 'critical' : 'information';
}

function textsOf(
  { child, parent, usedEnd }: LinkFacts,
  notices: readonly NoticeFacts[],
): Record<string, string> {
  return {
    registryNo: parent.registryNo,
    reference: certificateText(parent),
    certificate: certificateText(child),
    used: dateText(usedEnd, child.datePrecision),
    notices: notices.map(({ number }) => number).join(', '),
    effective: notices.map(({ effectiveOn }) => effectiveOn).join(', '),
  };
}
