import { addMonths, dateText, isNotAfter, performed, periodOf } from './days.ts';
import type { ChainFacts, LinkFacts, ValueFacts } from './facts.ts';
import { rowInForce } from './in-force.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ChainRuleOf } from './rule.ts';

/** Beyond this age no calibration is relied on without an analysis of its own (NIST GMP 11, from memory), months. */
const LONGEST = 120;
const WITHOUT_AGE = ['realization run', 'consensus value', 'earlier definition'];

/**
 * How old the oldest calibration was when it was leaned on, and how old the chain is in all. A link within a programme
 * is judged by it (B-14), not here: this rule finds what no programme governs and is older than ten years.
 */
export const agesAlongChain: ChainRuleOf = {
  id: 'B-49',
  title: 'Ages along the chain',
  scope: 'chain',
  severity: 'minor',
  verdicts: ['today'],
  sentences: {
    ages: 'Oldest at its use was {certificate} ({performed}, leaned on until {used}: {age}). From {top} ({topDate}) to {day} lie {total}.',
    'too old':
      'Certificate {certificate} ({performed}) was leaned on until {used}, {age} later, and no calibration programme of {laboratory} for {registryNo} is on record; one would say for how long it is relied on.',
    undecided:
      'Certificate {certificate} ({performed}) was leaned on until {used}, and no calibration programme of {laboratory} for {registryNo} is on record; the exact days would decide whether that is more than ten years.',
    'no link': 'The chain has no link to a calibration that ages.',
  },
  judge(chain) {
    const links = chain.links.filter(isAgeing);
    const oldest = oldestOf(links);
    if (!oldest) return doesNotApply('no link');
    const ungoverned = links.filter((link) => !isGoverned(link));
    const tooOld = ungoverned.find((link) => isWithinLongest(link) === false);
    if (tooOld) return fails('too old', textsOf(tooOld, chain));
    const open = ungoverned.find((link) => isWithinLongest(link) === null);
    if (open) return cannotBeJudged('undecided', textsOf(open, chain));
    return holds('ages', textsOf(oldest, chain));
  },
};

function isAgeing({ role, parent, usedAs }: LinkFacts): boolean {
  if (role !== 'reference' || usedAs === 'class limit') return false;
  return parent.rootKind === null || !WITHOUT_AGE.includes(parent.rootKind);
}

function isGoverned({ child, programmes, usedEnd }: LinkFacts): boolean {
  const { last } = periodOf(usedEnd, child.datePrecision);
  return rowInForce(programmes, last, last) !== null;
}

/** Whether the use ended within the longest age; null where the precision does not say. */
function isWithinLongest({ child, parent, usedEnd }: LinkFacts): boolean | null {
  return isNotAfter(periodOf(usedEnd, child.datePrecision), addMonths(performed(parent), LONGEST));
}

function monthsOf({ parent, usedEnd }: LinkFacts): number {
  return monthsBetween(parent.performedEnd, usedEnd);
}

function oldestOf(links: readonly LinkFacts[]): LinkFacts | null {
  let oldest: LinkFacts | null = null;
  let most = -1;
  for (const link of links) {
    const months = monthsOf(link);
    if (months > most) [oldest, most] = [link, months];
  }
  return oldest;
}

function textsOf(link: LinkFacts, { values, question }: ChainFacts): Record<string, string> {
  const top = values.reduce((first, value) => (value.performedEnd < first.performedEnd ? value : first));
  return {
    certificate: certificateText(link.parent),
    registryNo: link.parent.registryNo,
    laboratory: link.child.issuer.name,
    performed: dayOf(link.parent),
    used: dateText(link.usedEnd, link.child.datePrecision),
    age: ageText(monthsOf(link)),
    top: certificateText(top),
    topDate: dayOf(top),
    day: question.day,
    total: ageText(monthsBetween(top.performedEnd, question.day)),
  };
}

function dayOf(value: ValueFacts): string {
  return dateText(value.performedEnd, value.datePrecision);
}

/** Whole months from one day to a later one; 0 where it is not later. */
function monthsBetween(from: string, to: string): number {
  const [a, b] = [from, to].map((day) => day.split('-').map(Number) as [number, number, number]) as [
    [number, number, number],
    [number, number, number],
  ];
  const months = 12 * (b[0] - a[0]) + b[1] - a[1] - (b[2] < a[2] ? 1 : 0);
  return Math.max(0, months);
}

function ageText(months: number): string {
  const [years, rest] = [Math.floor(months / 12), months % 12];
  const parts = [
    ...(years > 0 ? [years === 1 ? '1 year' : `${years} years`] : []),
    ...(rest > 0 ? [rest === 1 ? '1 month' : `${rest} months`] : []),
  ];
  return parts.length > 0 ? parts.join(' ') : 'less than a month';
}
