import { isExchanged, isSwapVisible } from './odd-one-out.ts';
import { certificateText, statedU, valueText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/**
 * Were two weights of the same nominal exchanged? Asked where the results of the two on one certificate differ by at
 * least 3 U and each fits the other's history and not its own. This question is our own: common practice, no source.
 */
export const duplicatesExchanged: ValueRule = {
  id: 'X-01',
  title: 'Duplicates of a set not exchanged',
  scope: 'value',
  severity: 'major',
  verdicts: ['today'],
  isLasting: true,
  sentences: {
    own: 'The value {value} of {registryNo} fits its own history, not that of {duplicate}.',
    exchanged:
      'On certificate {certificate} {registryNo} ({marking}) and {duplicate} ({duplicateMarking}) each fit the history of the other. Were the two exchanged?',
    single: 'No other weight of the set has the same nominal value on certificate {certificate}.',
    close: '{registryNo} and {duplicate} differ by less than 3 U: they cannot be told apart.',
    first: 'There is no other value of {registryNo} and {duplicate} to compare with.',
    'no uncertainty':
      'Certificate {certificate} states no U; without it {registryNo} and {duplicate} cannot be told apart.',
    'others without uncertainty':
      'The other values of {registryNo} and {duplicate} state no U to compare with.',
  },
  judge(value) {
    const exchanged = value.duplicates.find((duplicate) => isExchanged(value, duplicate));
    const visible = value.duplicates.find((duplicate) => isSwapVisible(value, duplicate.result) !== false);
    const duplicate = exchanged ?? visible ?? value.duplicates[0];
    const known = {
      certificate: certificateText(value),
      registryNo: value.registryNo,
      marking: value.marking,
      value: valueText(value),
      duplicate: duplicate?.registryNo ?? '',
      duplicateMarking: duplicate?.marking ?? '',
    };
    if (!duplicate) return doesNotApply('single', known);
    if (exchanged) return fails('exchanged', known);
    const past = [...value.history, ...duplicate.history];
    if (past.length === 0) return doesNotApply('first', known);
    if (!visible) return doesNotApply('close', known);
    if (isSwapVisible(value, duplicate.result) === null) return cannotBeJudged('no uncertainty', known);
    return past.every((one) => statedU(one) === null)
      ? cannotBeJudged('others without uncertainty', known)
      : holds('own', known);
  },
};
