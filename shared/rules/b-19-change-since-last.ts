import type { HistoryFacts, ValueFacts } from './facts.ts';
import { isUnitQuestioned } from './b-18-unit.ts';
import { dateText } from './days.ts';
import { mpeOf } from './mpe.ts';
import {
  amountText,
  certificateText,
  deviationOf,
  ratioText,
  statedU,
  uOfDifference,
  valueText,
} from './numbers.ts';
import {
  CLEAR_CHANGE,
  isExchanged,
  isSignOdd,
  isUnitOdd,
  splitHistory,
  wasExchanged,
} from './odd-one-out.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type Finding, type ValueRule } from './rule.ts';

/** A year of 365.25 days. */
const MILLISECONDS_OF_YEAR = 31_557_600_000;

/**
 * Change since the last calibration of the same epoch against its U (k = 2) with covariance. Between 1 and 1.5 it is
 * a question only: 4.6 % of honest pairs lie there or beyond. Where a drift was declared for the weight, a change
 * beyond U is weighed against U and that drift together, since results in between counted with it. An M weight in
 * service may wear by its maximum permissible error (common practice, no source). One fault is reported once: a value whose sign, unit or identity
 * is asked about is not asked about again, and its successor is compared with the value before it.
 */
export const changeSinceLast: ValueRule = {
  id: 'B-19',
  title: 'Change since the last calibration',
  scope: 'value',
  severity: 'major',
  verdicts: ['today'],
  isLasting: true,
  sentences: {
    small:
      'Changed from {previousValue} (certificate {previous}, {previousDate}) to {value}: {ratio} of its U.',
    question:
      'Changed from {previousValue} (certificate {previous}, {previousDate}) to {value}: {ratio} of its U. One honest pair in twenty does.',
    large:
      'Changed from {previousValue} (certificate {previous}, {previousDate}) to {value} (certificate {certificate}): {ratio} of its U. Find the cause, or open a new epoch for {registryNo}.',
    returned:
      'Differs from certificate {previous} ({previousValue}) by {ratio} of its U, but agrees with the value before it: the question belongs to {previous}.',
    adjusted:
      'Found at {value}, {ratio} of its U away from {previousValue} (certificate {previous}, {previousDate}), and {reason} in the same calibration: the change has been dealt with.',
    'within drift':
      'Changed from {previousValue} (certificate {previous}, {previousDate}) to {value}: {ratio} of its U, and {driftRatio} of it with the drift declared for {registryNo}, {allowance} in that time.',
    'beyond drift':
      'Changed from {previousValue} (certificate {previous}, {previousDate}) to {value} (certificate {certificate}): {ratio} of its U, and {driftRatio} of it even with the drift declared for {registryNo}, {allowance} in that time. Results in between counted with less.',
    wear: 'Changed from {previousValue} to {value}, {ratio} of its U, within what class {class} allows for wear.',
    first: 'There is no earlier value of {registryNo} in this epoch to compare with.',
    'asked elsewhere':
      'The value of certificate {certificate} is asked about by another rule (sign, unit or exchanged weights).',
    'no uncertainty': 'Certificate {without} states no U; without it the change cannot be weighed.',
  },
  judge(value) {
    const known = { certificate: certificateText(value), registryNo: value.registryNo };
    if (isAskedElsewhere(value)) return doesNotApply('asked elsewhere', known);
    const earlier = splitHistory(value).earlier.toReversed();
    const previous = earlier.find((past) => isComparable(value, past));
    if (!previous) return doesNotApply('first', known);
    const ratio = changeRatio(value, previous);
    if (ratio === null) {
      const without = statedU(value) === null ? value : previous;
      return cannotBeJudged('no uncertainty', { ...known, without: certificateText(without) });
    }
    const parameters = {
      ...known,
      class: value.class ?? '',
      value: valueText(value),
      previous: certificateText(previous),
      previousValue: valueText(previous),
      previousDate: dateText(previous.performedEnd, previous.datePrecision),
      ratio: ratioText(ratio),
    };
    if (ratio <= 1) return holds('small', parameters);
    if (ratio <= CLEAR_CHANGE) return holds('question', parameters, 'information');
    if (isAdjustedSince(value)) {
      return holds('adjusted', { ...parameters, reason: value.nextEpoch?.reason ?? '' }, 'information');
    }
    if (isWear(value, previous)) return holds('wear', parameters, 'information');
    const hasReturned = earlier
      .slice(earlier.indexOf(previous) + 1)
      .some((past) => isComparable(value, past) && (changeRatio(value, past) ?? Infinity) <= 1);
    if (hasReturned) return holds('returned', parameters, 'information');
    return judgeDrift(value, previous, parameters) ?? fails('large', parameters);
  },
};

/** |change| / U(change), k = 2, with a further u if there is one; null where either states no U. */
function changeRatio(value: ValueFacts, past: HistoryFacts, uMore = 0): number | null {
  const u = uOfDifference(value, past, past.covariance);
  return u === null ? null : Math.abs(deviationOf(value) - deviationOf(past)) / (2 * Math.hypot(u, uMore));
}

/** A change beyond U against the drift that was declared for the weight; null where none was by then. */
function judgeDrift(
  value: ValueFacts,
  previous: HistoryFacts,
  parameters: Record<string, string>,
): Finding | null {
  const rates = value.weight.driftRates.filter(
    ({ determinedOn }) => determinedOn === null || determinedOn <= value.performedEnd,
  );
  if (rates.length === 0) return null;
  const years = (Date.parse(value.performedEnd) - Date.parse(previous.performedEnd)) / MILLISECONDS_OF_YEAR;
  const u = Math.max(...rates.map((rate) => rate.u)) * years;
  const ratio = changeRatio(value, previous, u) ?? 0;
  const withDrift = {
    ...parameters,
    driftRatio: ratioText(ratio),
    allowance: amountText(2 * u, value),
  };
  return ratio > CLEAR_CHANGE
    ? fails('beyond drift', withDrift)
    : holds('within drift', withDrift, 'information');
}

function isAskedElsewhere(value: ValueFacts): boolean {
  const { earlier, later } = splitHistory(value);
  return (
    isSignOdd(value, earlier, later) ||
    isUnitQuestioned(value) ||
    value.duplicates.some((duplicate) => isExchanged(value, duplicate))
  );
}

/** Whether an earlier value can be compared with: its own sign, unit or identity is not the odd one. */
function isComparable(value: ValueFacts, past: HistoryFacts): boolean {
  const others = [...value.history, value].filter((other) => other.uid !== past.uid);
  const earlier = others.filter((other) => other.performedEnd <= past.performedEnd);
  const later = others.filter((other) => other.performedEnd > past.performedEnd);
  return !isSignOdd(past, earlier, later) && !isUnitOdd(past, earlier, later) && !wasExchanged(value, past);
}

/** A change that was found and ended in an intervention within the same calibration has its new epoch already. */
function isAdjustedSince({ stage, nextEpoch, performedEnd }: ValueFacts): boolean {
  return stage === 'as found' && nextEpoch !== null && nextEpoch.beginsOn <= performedEnd;
}

function isWear(value: ValueFacts, previous: HistoryFacts): boolean {
  const mpe = value.class?.startsWith('M') ? mpeOf(value) : null;
  return mpe !== null && mpe.gte(Math.abs(deviationOf(value) - deviationOf(previous)));
}
