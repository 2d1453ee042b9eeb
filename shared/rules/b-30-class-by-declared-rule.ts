import { Decimal } from '#shared/decimal.ts';
import { CLASS_SENTENCES, classStatement } from './class-limits.ts';
import { halfDigit, halfDigitOfU } from './numbers.ts';
import { cannotBeJudged, fails, holds, type ValueRule } from './rule.ts';

/**
 * A class statement follows the decision rule that the laboratory declared: guarded, |d| <= MPE - U (OIML R 111-1,
 * 5.3), or simple, |d| <= MPE (JCGM 106, 8.2.3; its condition on U is B-29). Where none is declared, both have to
 * agree.
 */
export const classByDeclaredRule: ValueRule = {
  id: 'B-30',
  title: 'Class statement follows the declared decision rule',
  scope: 'value',
  severity: 'critical',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    follows:
      'The deviation {value} keeps the {rule} decision rule for class {class} (maximum permissible error {mpe}).',
    'follows both':
      'The deviation {value} keeps class {class} (maximum permissible error {mpe}) by either decision rule.',
    breaks:
      'Certificate {certificate} states class {class} for {registryNo}, but {value} with U {expandedU} does not keep the {rule} decision rule (maximum permissible error {mpe}).',
    'breaks both':
      'Certificate {certificate} states class {class} for {registryNo}, but {value} keeps it by neither decision rule (maximum permissible error {mpe}).',
    'no rule':
      'Certificate {certificate} declares no decision rule, and for {value} with U {expandedU} the rules differ (maximum permissible error {mpe}).',
    rounding:
      'The deviation {value} with U {expandedU} lies on the limit of class {class} within rounding; the unrounded values would decide.',
    ...CLASS_SENTENCES,
  },
  judge(value) {
    const statement = classStatement(value);
    if (statement.finding) return statement.finding;
    const { mpe, expandedU, factor } = statement;
    const size = new Decimal(value.deviation).abs();
    const roundingOfSum = halfDigit(value).plus(halfDigitOfU(value).times(factor));
    const guarded = keeps(size.plus(expandedU), mpe, roundingOfSum);
    const simple = keeps(size, mpe, halfDigit(value));
    const rule = value.decisionRule;
    const parameters = { ...statement.parameters, rule: rule ?? '' };
    if (rule === null) {
      if (guarded === true) return holds('follows both', parameters);
      return simple === false ? fails('breaks both', parameters) : cannotBeJudged('no rule', parameters);
    }
    const outcome = rule === 'guarded' ? guarded : simple;
    if (outcome === null) return cannotBeJudged('rounding', parameters);
    return outcome ? holds('follows', parameters) : fails('breaks', parameters);
  },
};

/** Whether an amount is within a limit; null where only rounding keeps it out. */
function keeps(amount: Decimal, limit: Decimal, rounding: Decimal): boolean | null {
  if (amount.lte(limit)) return true;
  return amount.minus(rounding).lte(limit) ? null : false;
}
