import { dateText, isNotAfter, issued } from './days.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type LinkRule } from './rule.ts';

/** The reference's certificate was issued, so its value known, by the day the result was authorised. */
export const referenceIssuedFirst: LinkRule = {
  id: 'B-13',
  title: 'Reference certificate issued before the result was authorised',
  scope: 'link',
  severity: 'major',
  verdicts: ['conduct'],
  sentences: {
    first: 'Certificate {reference} was issued on {issued}, by the issue of {certificate} on {authorised}.',
    definition: 'The earlier definition has no certificate.',
    later:
      'Certificate {certificate} was issued on {authorised}, before the certificate of its reference, {reference}, on {issued}; check which value was used.',
    undecided:
      'The issue of {reference} ({issued}) and of {certificate} ({authorised}) are dated too coarsely to be put in order; the exact days would decide.',
  },
  judge({ child, parent }) {
    if (parent.rootKind === 'earlier definition') return doesNotApply('definition');
    const parameters = {
      reference: certificateText(parent),
      issued: dateText(parent.issuedOn, parent.datePrecision),
      certificate: certificateText(child),
      authorised: dateText(child.issuedOn, child.datePrecision),
    };
    const first = isNotAfter(issued(parent), issued(child));
    if (first === null) return cannotBeJudged('undecided', parameters);
    return first ? holds('first', parameters) : fails('later', parameters);
  },
};
