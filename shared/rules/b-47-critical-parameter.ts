import { percentText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, holds, type ChainRuleOf } from './rule.ts';

/** Share of the variance from which an input is a critical parameter. */
const CRITICAL_SHARE = 0.25;

/** How much of the variance comes from the top of the chain; from a quarter on it is marked as a critical parameter. */
export const criticalParameter: ChainRuleOf = {
  id: 'B-47',
  title: 'Share of the variance from the top of the chain',
  scope: 'chain',
  severity: 'information',
  verdicts: ['today'],
  sentences: {
    small: '{share} of the variance comes from the top of the chain ({names}).',
    critical: '{share} of the variance comes from the top of the chain ({names}): a critical parameter.',
    unknown: 'The shares of the variance are unknown, because a certificate states no U.',
    none: 'No part of the variance is traced to the top of the chain.',
  },
  judge(chain) {
    if (chain.contributions === null) return cannotBeJudged('unknown');
    const top = chain.contributions.filter((part) => part.isTop);
    if (top.length === 0) return doesNotApply('none');
    const share = top.reduce((sum, part) => sum + part.share, 0);
    const parameters = { share: percentText(share), names: top.map((part) => part.label).join('; ') };
    return holds(share > CRITICAL_SHARE ? 'critical' : 'small', parameters);
  },
};
