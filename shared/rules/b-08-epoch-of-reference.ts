import { dateText, isBefore, isNotAfter, periodOf } from './days.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type LinkRule } from './rule.ts';

/** After an adjustment, repair or damage the values before it are no reference values any more. */
export const referenceWithinEpoch: LinkRule = {
  id: 'B-08',
  title: 'Reference value belongs to the present life of the weight',
  scope: 'link',
  severity: 'critical',
  verdicts: ['today'],
  sentences: {
    untouched: 'No intervention on {registryNo} is on record after certificate {certificate}.',
    before: '{registryNo} was used until {used}, before it was {reason} ({begins}).',
    after:
      'Certificate {certificate} was used until {used}, but {registryNo} was {reason} by {begins}; use a value determined after it.',
    between:
      '{registryNo} was last known good on {lastGood} and found {reason} on {begins}; whether the use on {used} lies before it has to be decided.',
    definition: 'The earlier definition has no epochs.',
  },
  judge({ child, parent, usedEnd }) {
    if (parent.rootKind === 'earlier definition') return doesNotApply('definition');
    const facts = { registryNo: parent.registryNo, certificate: certificateText(parent) };
    const next = parent.nextEpoch;
    if (next === null) return holds('untouched', facts);
    const use = periodOf(usedEnd, child.datePrecision);
    const parameters = {
      ...facts,
      used: dateText(usedEnd, child.datePrecision),
      reason: next.reason,
      begins: next.beginsOn,
      lastGood: next.lastGoodOn ?? 'an unknown day',
    };
    const lastGood = next.lastGoodOn ?? next.beginsOn;
    if (isNotAfter(use, periodOf(lastGood, 'day'))) return holds('before', parameters);
    if (isBefore(periodOf(next.beginsOn, 'day'), use)) return fails('after', parameters);
    return cannotBeJudged('between', parameters);
  },
};
