import { coverage } from './b-21-u-covers-what-is-carried.ts';
import { amountText, certificateText, expandedUText, percentText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/** Effect on the carried u from which a covariance left out is reported. */
const EFFECT = 0.05;

/**
 * Where references are combined that share an ancestor, their covariance (or linear addition) was used: the stated U
 * covers what they carry with covariance. Reported only where the covariance changes the carried u by more than 5 %.
 */
export const sharedAncestor: ValueRule = {
  id: 'B-48',
  title: 'Covariance of combined references',
  scope: 'value',
  severity: 'major',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    counted:
      'The references of certificate {certificate} share {ancestors}; U {expandedU} covers their covariance.',
    negligible:
      'The references of certificate {certificate} share {ancestors}; their covariance changes u by {effect} only.',
    'left out':
      'The references of certificate {certificate} share {ancestors}. With their covariance they carry {carried}, {effect} more than without; U {expandedU} does not cover it.',
    single: 'Certificate {certificate} combines no references that share an ancestor.',
    unknown:
      'The references of certificate {certificate} share {ancestors}, and what they carry is unknown: {missing} states no U.',
    'no uncertainty': 'Certificate {certificate} states no U with its k.',
  },
  judge(value) {
    const known = {
      certificate: certificateText(value),
      ancestors: value.sharedAncestors.join(', '),
      expandedU: expandedUText(value),
      missing: value.carriedMissing.join('; ') || 'a reference',
    };
    if (value.references < 2 || value.sharedAncestors.length === 0) return doesNotApply('single', known);
    if (value.expandedU === null || value.k === null) return cannotBeJudged('no uncertainty', known);
    const { carriedVariance, carriedVarianceIndependent } = value;
    if (carriedVariance === null || carriedVarianceIndependent === null)
      return cannotBeJudged('unknown', known);
    const effect = carriedVariance > 0 ? 1 - Math.sqrt(carriedVarianceIndependent / carriedVariance) : 0;
    const parameters = {
      ...known,
      effect: percentText(Math.abs(effect)),
      carried: amountText(Math.sqrt(carriedVariance) * Number(value.k), value),
    };
    if (effect <= EFFECT) return holds('negligible', parameters);
    return coverage(value, value.k, carriedVariance) === 'deficit'
      ? fails('left out', parameters)
      : holds('counted', parameters);
  },
};
