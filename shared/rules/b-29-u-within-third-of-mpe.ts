import { CLASS_SENTENCES, classStatement } from './class-limits.ts';
import { halfDigitOfU } from './numbers.ts';
import { cannotBeJudged, fails, holds, type ValueRule } from './rule.ts';

/**
 * A class is stated only where U (k = 2) is at most a third of the maximum permissible error: an exact ratio. A
 * printed U that straddles it cannot be judged; the unrounded one would decide.
 */
export const uWithinThirdOfMpe: ValueRule = {
  id: 'B-29',
  title: 'U allows the class statement',
  scope: 'value',
  severity: 'major',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    within:
      'U {expandedU} is at most a third of the maximum permissible error of class {class}, {limit} at k = 2.',
    above:
      'Certificate {certificate} states class {class} for {registryNo} with U {expandedU}; class {class} needs at most {limit} at k = 2.',
    rounding:
      'U {expandedU} straddles a third of the maximum permissible error of class {class}, {limit}; the unrounded U would decide.',
    ...CLASS_SENTENCES,
  },
  judge(value) {
    const statement = classStatement(value);
    if (statement.finding) return statement.finding;
    const { parameters, mpe, expandedU, factor } = statement;
    const third = mpe.div(3);
    if (expandedU.lte(third)) return holds('within', parameters);
    const least = expandedU.minus(halfDigitOfU(value).times(factor));
    return least.lte(third) ? cannotBeJudged('rounding', parameters) : fails('above', parameters);
  },
};
