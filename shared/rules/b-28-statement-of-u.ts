import {
  certificateText,
  expandedUText,
  inReportedUnit,
  isUDecimalsKept,
  printedU,
  valueText,
} from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/** U is given with k and coverage probability, to at most two significant digits, and the value to the same place. */
export const statementOfU: ValueRule = {
  id: 'B-28',
  title: 'U stated with k and probability, and rounded',
  scope: 'value',
  severity: 'minor',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    complete:
      'Certificate {certificate} states U {expandedU} with k = {k} and p = {coverage}, the value to the same place.',
    'no k': 'Certificate {certificate} states U without k; the coverage factor would complete it.',
    digits: 'Certificate {certificate} states U {expandedU}: more than two significant digits.',
    place: 'Certificate {certificate} states {value} and U {expandedU}: not to the same place.',
    'no uncertainty': 'Certificate {certificate} states no U.',
    'no probability': 'The coverage probability of certificate {certificate} is not on record.',
    'not printed':
      'The decimals of U on certificate {certificate} are not on record, so its place cannot be compared with the value.',
    definition: 'The earlier definition has no U by definition.',
  },
  judge(value) {
    const parameters = {
      certificate: certificateText(value),
      value: valueText(value),
      expandedU: expandedUText(value),
      k: value.k ?? '',
      coverage: value.coverage ?? '',
    };
    if (value.rootKind === 'earlier definition') return doesNotApply('definition');
    if (value.expandedU === null) return cannotBeJudged('no uncertainty', parameters);
    if (value.k === null) return fails('no k', parameters);
    if (significantDigits(inReportedUnit(value, value.expandedU).toFixed(), printedU(value)) > 2)
      return fails('digits', parameters);
    if (!isUDecimalsKept(value)) return cannotBeJudged('not printed', parameters);
    if (value.reportedUDecimals !== value.reportedDecimals) return fails('place', parameters);
    return value.coverage === null
      ? cannotBeJudged('no probability', parameters)
      : holds('complete', parameters);
  },
};

/** Significant digits of U as printed; zeros at the end of a whole number are not counted, since they may only hold the place. */
function significantDigits(plain: string, printed: string): number {
  const isWhole = !printed.includes('.');
  const digits = (isWhole ? plain.replace(/0+$/, '') : printed).replace('.', '').replace(/^0+/, '');
  return digits.length;
}
