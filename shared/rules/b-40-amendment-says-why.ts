import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/** Fewer characters than this say nothing. */
const SHORTEST_REASON = 3;

/**
 * A further revision says what it changes and why. That it names the one it amends is kept by the register: revisions
 * of one certificate are numbered, and each line points at the one it replaces.
 */
export const amendmentSaysWhy: ValueRule = {
  id: 'B-40',
  title: 'Amendment states its reason',
  scope: 'value',
  severity: 'major',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    stated: 'Certificate {certificate} amends revision {before} and states what changed and why.',
    'no reason':
      'Certificate {certificate} amends revision {before} without stating what changed and why; a further revision can.',
    'not entered':
      'The recipient entered certificate {certificate} without what it changes and why; the certificate itself would tell.',
    'first issue': 'Certificate {certificate} is the first issue.',
  },
  judge(value) {
    const parameters = { certificate: certificateText(value), before: String(value.revisionN - 1) };
    if (value.revisionN <= 1) return doesNotApply('first issue', parameters);
    const reason = value.sheet.amendmentReason?.trim() ?? '';
    if (reason.length >= SHORTEST_REASON) return holds('stated', parameters);
    return value.registeredByIssuer
      ? fails('no reason', parameters)
      : cannotBeJudged('not entered', parameters, 'minor');
  },
};
