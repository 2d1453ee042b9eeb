import { UNIT_DEFINITIONS } from '#shared/engine/quantity/units.ts';
import { inferLocal } from '#shared/engine/network/infer-local.ts';
import type { ResultFacts } from './facts.ts';
import { amountText, certificateText, expandedUText, printedU } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/**
 * ((U + half a last digit)/k)^2 is at least the variance that the references and declared sources bring, each with
 * its sensitivity and its u as used, with covariance. Never "U at least the U of the reference": a subdivided weight
 * has a smaller absolute U. Because each parent counts as used, a deficit is found once, where it arises.
 */
export const uCoversWhatIsCarried: ValueRule = {
  id: 'B-21',
  title: 'U covers what its references carry',
  scope: 'value',
  severity: 'critical',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    covers:
      'U {expandedU} on certificate {certificate} covers {carried}, which its references carry at the same k.',
    rounding:
      'U {expandedU} on certificate {certificate} equals {carried}, which its references carry, within its last digit.',
    deficit:
      'Certificate {certificate} states U {expandedU} for {registryNo}, but its references alone carry {carried} at the same k; a revision with the larger U would mend it.',
    'no references': 'Certificate {certificate} leans on nothing here.',
    'no uncertainty': 'Certificate {certificate} states no U with its k.',
    'reference without uncertainty':
      'What {registryNo} inherits is unknown, because certificate {missing} states no U.',
  },
  judge(value) {
    const parameters = {
      certificate: certificateText(value),
      registryNo: value.registryNo,
      expandedU: expandedUText(value),
      missing: value.carriedMissing.join('; ') || 'of a reference',
    };
    if (value.rootKind !== null || value.references === 0) return doesNotApply('no references', parameters);
    if (value.expandedU === null || value.k === null) return cannotBeJudged('no uncertainty', parameters);
    if (value.carriedVariance === null) return cannotBeJudged('reference without uncertainty', parameters);
    const carried = amountText(Math.sqrt(value.carriedVariance) * Number(value.k), value);
    const verdict = coverage(value, value.k, value.carriedVariance);
    if (verdict === 'deficit') return fails('deficit', { ...parameters, carried });
    return verdict === 'holds'
      ? holds('covers', { ...parameters, carried })
      : holds('rounding', { ...parameters, carried }, 'information');
  },
};

/**
 * Whether the stated U covers a variance, its last digit allowed for.
 * @param carriedVariance g2
 */
export function coverage(
  value: ResultFacts,
  k: string,
  carriedVariance: number,
): ReturnType<typeof inferLocal>['verdict'] {
  // In the reported unit the last printed digit is the last digit of the text.
  const scale = 10 ** (-2 * UNIT_DEFINITIONS[value.reportedUnit].exponent);
  return inferLocal({
    expandedUncertainty: printedU(value),
    coverageFactor: Number(k),
    carriedVariance: carriedVariance * scale,
  }).verdict;
}
