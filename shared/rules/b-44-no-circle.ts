import type { LinkFacts } from './facts.ts';
import { dateText, isNotAfter, performed } from './days.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ChainRuleOf } from './rule.ts';

/** No calibration depends on itself, and by calendar day none leans on a later one, declared bracketing excepted. */
export const noCircle: ChainRuleOf = {
  id: 'B-44',
  title: 'No circle, dates in order',
  scope: 'chain',
  severity: 'block',
  verdicts: ['conduct'],
  sentences: {
    'in order': 'No calibration leans on itself or on a later one.',
    circle: 'These results lean on each other in a circle: {circle}. One of the links has to go.',
    'out of order':
      'Certificate {certificate} ({date}) leans on {reference}, which was determined later ({referenceDate}); correct the dates or the link.',
    undecided:
      'Certificate {certificate} ({date}) and its reference {reference} ({referenceDate}) are dated too coarsely to be put in order; the exact day would decide.',
    alone: 'There is no link to put in order.',
  },
  judge(chain) {
    if (chain.circle !== null) {
      const names = chain.circle.map(
        (uid) => chain.values.find((value) => value.uid === uid)?.registryNo ?? uid,
      );
      return fails('circle', { circle: names.join(' ← ') });
    }
    const links = chain.links.filter((link) => link.role === 'reference' && isDated(link));
    if (links.length === 0) return doesNotApply('alone');
    const wrong = links.find((link) => order(link) === false);
    if (wrong) return fails('out of order', textsOf(wrong));
    const undecided = links.find((link) => order(link) === null);
    return undecided ? cannotBeJudged('undecided', textsOf(undecided)) : holds('in order');
  },
};

function isDated(link: LinkFacts): boolean {
  return link.parent.rootKind !== 'earlier definition' && link.usedAs !== 'bracketing';
}

function order({ child, parent }: LinkFacts): boolean | null {
  return isNotAfter(performed(parent), performed(child));
}

function textsOf({ child, parent }: LinkFacts): Record<string, string> {
  return {
    certificate: certificateText(child),
    date: dateText(child.performedEnd, child.datePrecision),
    reference: certificateText(parent),
    referenceDate: dateText(parent.performedEnd, parent.datePrecision),
  };
}
