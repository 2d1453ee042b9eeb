import { isSignOdd, isSignVisible, splitHistory } from './odd-one-out.ts';
import { certificateText, expandedUText, shownValueText, statedU } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/**
 * Was the sign of the correction changed? Asked where the deviation is at least 1.5 U and fits the weight's other
 * values of the same epoch only with the other sign. Common practice, no source.
 */
export const signOfCorrection: ValueRule = {
  id: 'B-17',
  title: 'Sign of the deviation fits the history',
  scope: 'value',
  severity: 'major',
  verdicts: ['today'],
  isLasting: true,
  sentences: {
    fits: 'The sign of {value} on certificate {certificate} fits the other values of {registryNo}.',
    turned:
      'Certificate {certificate} states {value}; the other values of {registryNo} ({others}) fit it only with the other sign. Was a correction entered as a deviation?',
    first: 'There is no other value of {registryNo} in this epoch to compare with.',
    small: 'The deviation {value} is less than 1.5 U ({expandedU}): its sign cannot be told.',
    'no uncertainty': 'Certificate {certificate} states no U; without it the sign cannot be told.',
    'others without uncertainty': 'The other values of {registryNo} ({others}) state no U to compare with.',
  },
  judge(value) {
    const { earlier, later } = splitHistory(value);
    const parameters = {
      certificate: certificateText(value),
      registryNo: value.registryNo,
      value: shownValueText(value),
      expandedU: expandedUText(value),
      others: value.history.map(certificateText).join('; '),
    };
    if (value.history.length === 0) return doesNotApply('first', parameters);
    const isVisible = isSignVisible(value);
    if (isVisible === null) return cannotBeJudged('no uncertainty', parameters);
    if (!isVisible) return doesNotApply('small', parameters);
    if (value.history.every((other) => statedU(other) === null))
      return cannotBeJudged('others without uncertainty', parameters);
    return isSignOdd(value, earlier, later) ? fails('turned', parameters) : holds('fits', parameters);
  },
};
