import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/** References are linked to each result, not to the certificate as a whole. */
export const referencePerResult: ValueRule = {
  id: 'B-11',
  title: 'Reference linked to this result, not only to the certificate',
  scope: 'value',
  severity: 'major',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    linked: 'The result for {registryNo} on certificate {certificate} has its own references.',
    root: '{certificate} is a stated reference ({rootKind}).',
    none: 'No result of certificate {certificate} names a reference.',
    'other results only':
      'Other results of certificate {certificate} name their references, the one for {registryNo} does not; link the reference used for it.',
    'others not known':
      'The result for {registryNo} names no reference, and the other results of certificate {certificate} are not on record.',
  },
  judge(value) {
    const parameters = {
      certificate: certificateText(value),
      registryNo: value.registryNo,
      rootKind: value.rootKind ?? '',
    };
    if (value.rootKind !== null) return doesNotApply('root', parameters);
    if (value.references > 0) return holds('linked', parameters);
    if (value.siblingLinesWithReferences === null) return cannotBeJudged('others not known', parameters);
    return value.siblingLinesWithReferences > 0
      ? fails('other results only', parameters)
      : doesNotApply('none', parameters);
  },
};
