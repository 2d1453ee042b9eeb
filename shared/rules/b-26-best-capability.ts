import { Decimal } from '#shared/decimal.ts';
import { bestCapability } from './best-capability.ts';
import {
  amountText,
  certificateText,
  decimalsOfU,
  expandedUText,
  inReportedUnit,
  isUDecimalsKept,
} from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/**
 * A U claimed under accreditation is not smaller than the best measurement capability of the scope at its nominal
 * and date, at the same k, after rounding to the decimals of U.
 */
export const uNotBelowBestCapability: ValueRule = {
  id: 'B-26',
  title: 'U not below the best measurement capability',
  scope: 'value',
  severity: 'critical',
  verdicts: ['conduct'],
  sentences: {
    above:
      'U {expandedU} on certificate {certificate} is not below the best capability of {issuer}, {best} at k = {k}.',
    below:
      'Certificate {certificate} states U {expandedU} under accreditation, below the best capability of {issuer}, {best} at k = {k} (line {line} of its scope).',
    'not claimed': 'Certificate {certificate} is not claimed under accreditation.',
    'no line': 'No line of the scope of {issuer} covers {registryNo} on {performed}; see B-27.',
    'no scope': 'No scope of {issuer} is on record.',
    'no uncertainty': 'Certificate {certificate} states no U with its k.',
    rounding:
      'U {expandedU} is about the best capability of {issuer}, {best}; the decimals of U as printed would decide.',
  },
  judge(value) {
    const known = {
      certificate: certificateText(value),
      registryNo: value.registryNo,
      issuer: value.issuer.name,
      expandedU: expandedUText(value),
      performed: value.performedEnd,
      k: value.k ?? '',
    };
    if (!value.underAccreditation) return doesNotApply('not claimed', known);
    if (value.scope.length === 0) return cannotBeJudged('no scope', known);
    if (value.expandedU === null || value.k === null) return cannotBeJudged('no uncertainty', known);
    const best = bestCapability(value, value.k);
    if (best === null) return doesNotApply('no line', known);
    const parameters = { ...known, best: amountText(best.expandedU, value), line: String(best.line.line) };
    const claimed = inReportedUnit(value, value.expandedU);
    const limit = inReportedUnit(value, best.expandedU.toFixed());
    // A limit that lies on the tie may have been rounded either way.
    const roundedTo = (decimals: number) => limit.toDecimalPlaces(decimals, Decimal.ROUND_HALF_DOWN);
    const decimals = decimalsOfU(value)!;
    if (claimed.lt(roundedTo(decimals))) return fails('below', parameters);
    const isSure = isUDecimalsKept(value) || claimed.gte(roundedTo(decimals + 1));
    return isSure ? holds('above', parameters) : cannotBeJudged('rounding', parameters);
  },
};
