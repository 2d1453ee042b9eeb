import type { LinkFacts, OtherValueFacts } from './facts.ts';
import { dateText, isBefore, issued, performed, periodOf } from './days.ts';
import { endingOf, knownBefore } from './in-force.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type LinkRule } from './rule.ts';

/**
 * The value used is the newest one of its epoch that was made known before the day of use, unless a fit or a
 * bracketing is declared. A certificate issued on the day of use came too late to be asked for.
 */
export const newestValueUsed: LinkRule = {
  id: 'B-81',
  title: 'Newest known value used',
  scope: 'link',
  severity: 'major',
  verdicts: ['conduct'],
  sentences: {
    newest:
      'Certificate {certificate} was the newest known value of {registryNo} when the work began on {used}.',
    older:
      'Certificate {certificate} ({determined}) was used from {used}, though {newer} ({newerDetermined}) had been issued on {newerIssued}; recompute with {newer}.',
    declared: 'A {usedAs} over several values is declared.',
    definition: 'The earlier definition has one value.',
    undecided:
      'Whether {newer} ({newerDetermined}, issued {newerIssued}) was known before {used} depends on exact days that are not on record.',
  },
  judge(link) {
    const { child, parent, usedAs, usedBegin } = link;
    if (parent.rootKind === 'earlier definition') return doesNotApply('definition');
    if (usedAs === 'fit' || usedAs === 'bracketing') return doesNotApply('declared', { usedAs });
    const texts = {
      certificate: certificateText(parent),
      registryNo: parent.registryNo,
      determined: dateText(parent.performedEnd, parent.datePrecision),
      used: dateText(usedBegin, child.datePrecision),
    };
    const newer = link.otherValues.filter((other) => other.sameEpoch).sort(newestFirst);
    const known = newer.find((other) => wasKnown(link, other) === true);
    if (known) return fails('older', { ...texts, ...textsOf(known) });
    const undecided = newer.find((other) => wasKnown(link, other) === null);
    return undecided
      ? cannotBeJudged('undecided', { ...texts, ...textsOf(undecided) })
      : holds('newest', texts);
  },
};

/** Whether another value is newer than the one used and was known, and stood, before the use began. */
function wasKnown({ child, parent, usedBegin }: LinkFacts, other: OtherValueFacts): boolean | null {
  const use = periodOf(usedBegin, child.datePrecision);
  const ending = endingOf(other.ends, knownBefore(use.first));
  if (ending !== null && ending.how !== 'unchanged') return false;
  const isNewer = isBefore(performed(parent), performed(other));
  const isKnown = isBefore(issued(other), use);
  if (isNewer === false || isKnown === false) return false;
  return isNewer === null || isKnown === null ? null : true;
}

function newestFirst(a: OtherValueFacts, b: OtherValueFacts): number {
  return a.performedEnd < b.performedEnd ? 1 : -1;
}

function textsOf(other: OtherValueFacts): Record<string, string> {
  return {
    newer: certificateText(other),
    newerDetermined: dateText(other.performedEnd, other.datePrecision),
    newerIssued: dateText(other.issuedOn, other.datePrecision),
  };
}
