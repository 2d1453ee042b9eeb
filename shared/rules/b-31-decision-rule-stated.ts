import { mpeOf } from './mpe.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';
import { nominalText } from './weight-class.ts';

/**
 * A statement of class says by which decision rule, and is made of a result that the specification covers: the
 * conventional mass, at a nominal value for which the class has a limit. R 111-1, 5.3, has a decision rule of its own,
 * so that a missing one weighs little.
 */
export const decisionRuleStated: ValueRule = {
  id: 'B-31',
  title: 'Decision rule and specification stated',
  scope: 'value',
  severity: 'major',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    stated: 'Certificate {certificate} states class {class} by the {rule} decision rule.',
    'no limit':
      'Certificate {certificate} states class {class} for {registryNo}, but the class has no limit at {nominal}; name the specification that has.',
    'no rule':
      'Certificate {certificate} states class {class} for {registryNo} without its decision rule; enter which was used.',
    'rule not entered':
      'The recipient entered certificate {certificate}, which states class {class}, without its decision rule; the certificate itself would tell.',
    'of mass only':
      'Certificate {certificate} states class {class} for the mass of {registryNo}; the class speaks of its conventional mass, which the certificate does not give.',
    'no class': 'Certificate {certificate} states no class.',
  },
  judge(value) {
    const known = {
      certificate: certificateText(value),
      registryNo: value.registryNo,
      class: value.class ?? '',
      nominal: nominalText(value.nominal),
      rule: value.decisionRule ?? '',
    };
    if (value.class === null) return doesNotApply('no class', known);
    if (mpeOf(value) === null) return fails('no limit', known);
    if (value.quantity === 'mass' && value.otherKind === null) return fails('of mass only', known);
    if (value.decisionRule !== null) return holds('stated', known);
    return value.registeredByIssuer
      ? fails('no rule', known, 'minor')
      : cannotBeJudged('rule not entered', known, 'information');
  },
};
