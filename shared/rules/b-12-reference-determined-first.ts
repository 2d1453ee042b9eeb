import { dateText, isNotAfter, issued, performed, periodOf } from './days.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type LinkRule } from './rule.ts';

/**
 * The reference value was determined by the day of its first use (calendar day), or the use is a declared bracketing
 * and the later value was issued by the time the result was authorised.
 */
export const referenceDeterminedFirst: LinkRule = {
  id: 'B-12',
  title: 'Reference determined before its use',
  scope: 'link',
  severity: 'critical',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    first: 'Certificate {reference} was determined on {determined}, by the first use on {used}.',
    bracketed:
      'Declared bracketing: certificate {reference} was issued on {issued}, by the issue of {certificate} on {authorised}.',
    definition: 'The earlier definition was not determined by a measurement.',
    later:
      'Certificate {reference} was determined on {determined}, after its first use on {used}; use the value known then, or declare a bracketing.',
    'bracketing too late':
      'Declared bracketing, but certificate {reference} was issued on {issued}, after {certificate} on {authorised}.',
    'same event':
      'Both results belong to certificate {certificate}: a calibration cannot lean on itself; link the reference from outside it.',
    undecided:
      'Certificate {reference} ({determined}) and its use ({used}) are dated too coarsely to be put in order; the exact day would decide.',
  },
  judge({ child, parent, usedAs, usedBegin }) {
    if (parent.rootKind === 'earlier definition') return doesNotApply('definition');
    const parameters = {
      reference: certificateText(parent),
      determined: dateText(parent.performedEnd, parent.datePrecision),
      issued: dateText(parent.issuedOn, parent.datePrecision),
      used: dateText(usedBegin, child.datePrecision),
      certificate: certificateText(child),
      authorised: dateText(child.issuedOn, child.datePrecision),
    };
    if (child.calibrationId === parent.calibrationId) return fails('same event', parameters, 'block');
    const first = isNotAfter(performed(parent), periodOf(usedBegin, child.datePrecision));
    if (first) return holds('first', parameters);
    if (usedAs === 'bracketing') {
      const known = isNotAfter(issued(parent), issued(child));
      if (known === null) return cannotBeJudged('undecided', parameters);
      return known ? holds('bracketed', parameters) : fails('bracketing too late', parameters);
    }
    return first === null ? cannotBeJudged('undecided', parameters) : fails('later', parameters);
  },
};
