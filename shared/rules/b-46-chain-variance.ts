import { coverage } from './b-21-u-covers-what-is-carried.ts';
import type { ChainFacts, ValueFacts } from './facts.ts';
import { amountText, certificateText, expandedUText, percentText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ChainRuleOf } from './rule.ts';

/** An excess of u below this share arises from the rounding of the certificates along the way. */
const ROUNDING_SHARE = 0.05;

/**
 * The variance that the whole chain carries is at most the one claimed at the focus: the chain form of B-21, once per
 * chain. A deficit upstream is inherited, and its certificate is named. That uncertainty grows downward is no rule:
 * the mean of two independent references is better than either.
 */
export const chainVariance: ChainRuleOf = {
  id: 'B-46',
  title: 'U covers what the whole chain carries',
  scope: 'chain',
  severity: 'major',
  verdicts: ['today'],
  sentences: {
    covers: 'U {expandedU} of {focus} covers {carried}, which the whole chain carries at the same k.',
    rounding: 'U {expandedU} of {focus} equals {carried}, which the whole chain carries, within rounding.',
    inherits:
      '{focus} states U {expandedU}, but the whole chain carries {carried} at the same k ({excess} more): it inherits the deficit of certificate {deficits}.',
    exceeds:
      '{focus} states U {expandedU}, but the whole chain carries {carried} at the same k: {excess} more.',
    'at the focus': 'The deficit arises at {focus} itself and is reported there (B-21).',
    root: '{focus} is a stated reference: nothing is carried to it.',
    'no uncertainty': '{focus} states no U with its k.',
    unknown: 'What the chain carries is unknown, because certificate {missing} states no U.',
    lost: 'What the chain carries is unknown: part of what it leans on cannot be computed.',
  },
  judge(chain) {
    const focus = chain.values.find((value) => value.uid === chain.focusUid)!;
    const known = {
      focus: certificateText(focus),
      expandedU: expandedUText(focus),
      missing: [...new Set(chain.values.flatMap((value) => value.carriedMissing))].join('; '),
    };
    if (focus.rootKind !== null || focus.references === 0) return doesNotApply('root', known);
    if (focus.expandedU === null || focus.k === null) return cannotBeJudged('no uncertainty', known);
    if (chain.varianceNow === null) return cannotBeJudged(known.missing === '' ? 'lost' : 'unknown', known);
    if (isDeficit(focus)) return doesNotApply('at the focus', known);
    return judgeExcess(chain, focus, focus.k, chain.varianceNow, known);
  },
};

function judgeExcess(
  chain: ChainFacts,
  focus: ValueFacts,
  k: string,
  variance: number,
  known: Record<string, string>,
) {
  const expanded = Math.sqrt(variance) * Number(k);
  const excess = expanded / Number(focus.expandedU) - 1;
  const parameters = {
    ...known,
    carried: amountText(expanded, focus),
    excess: percentText(Math.max(0, excess)),
  };
  const verdict = coverage(focus, k, variance);
  if (verdict === 'holds') return holds('covers', parameters);
  if (verdict === 'within rounding') return holds('rounding', parameters);
  const deficits = chain.values.filter(isDeficit).map(certificateText);
  if (deficits.length > 0) return fails('inherits', { ...parameters, deficits: deficits.join('; ') });
  return excess > ROUNDING_SHARE
    ? fails('exceeds', parameters)
    : holds('rounding', parameters, 'information');
}

function isDeficit(value: ValueFacts): boolean {
  if (value.expandedU === null || value.k === null || value.carriedVariance === null) return false;
  return value.references > 0 && coverage(value, value.k, value.carriedVariance) === 'deficit';
}
