import { scopeLinesOn } from './best-capability.ts';
import { dateText, issued, periodOf } from './days.ts';
import { amountText, certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/** A result claimed under accreditation lies inside the scope on the days it was performed and on the day of issue. */
export const withinScope: ValueRule = {
  id: 'B-27',
  title: 'Inside the scope when performed and when issued',
  scope: 'value',
  severity: 'critical',
  verdicts: ['conduct'],
  sentences: {
    inside: 'The scope of {issuer} covers {quantity} at {nominal} on {performed} and on {issuedOn}.',
    outside:
      'Certificate {certificate} claims accreditation, but the scope of {issuer} did not cover {quantity} at {nominal} on {day}.',
    'not claimed': 'Certificate {certificate} is not claimed under accreditation.',
    'no scope': 'Certificate {certificate} claims accreditation, and no scope of {issuer} is on record.',
    undecided:
      'The scope of {issuer} for {quantity} at {nominal} changed within {performed} to {issuedOn}; the exact days would decide.',
  },
  judge(value) {
    const precision = value.datePrecision;
    const parameters = {
      certificate: certificateText(value),
      issuer: value.issuer.name,
      quantity: value.quantity,
      nominal: amountText(Number(value.nominal), { reportedUnit: Number(value.nominal) < 1 ? 'mg' : 'g' }),
      performed: dateText(value.performedEnd, precision),
      issuedOn: dateText(value.issuedOn, precision),
    };
    if (!value.underAccreditation) return doesNotApply('not claimed', parameters);
    if (value.scope.length === 0) return cannotBeJudged('no scope', parameters);
    const isCovered = (day: string) => scopeLinesOn(value, day).length > 0;
    let isDecided = true;
    const periods = [
      periodOf(value.performedBegin, precision),
      periodOf(value.performedEnd, precision),
      issued(value),
    ];
    for (const { first, last } of periods) {
      const isAtFirst = isCovered(first);
      const isAtLast = last === first ? isAtFirst : isCovered(last);
      if (!isAtFirst && !isAtLast) {
        return fails('outside', { ...parameters, day: dateText(first, precision) });
      }
      isDecided &&= isAtFirst && isAtLast;
    }
    return isDecided ? holds('inside', parameters) : cannotBeJudged('undecided', parameters);
  },
};
