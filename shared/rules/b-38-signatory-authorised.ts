import { dateText, issued } from './days.ts';
import { rowInForce } from './in-force.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/**
 * Whoever signed was authorised to sign calibrations on the day of issue. It speaks of certificates that their issuer
 * entered as it issued them: of one entered later, or by its recipient, the register knows who entered it and not who
 * signed. Nobody is named: who works where is not for every reader of a chain.
 */
export const signatoryAuthorised: ValueRule = {
  id: 'B-38',
  title: 'Signatory authorised on the day of issue',
  scope: 'value',
  severity: 'major',
  verdicts: ['conduct'],
  sentences: {
    authorised: 'Whoever signed certificate {certificate} was authorised to sign calibrations on {issuedOn}.',
    'not authorised':
      'Whoever signed certificate {certificate} had no authorisation of {issuer} to sign calibrations on {issuedOn}; an authorisation for that day, or a signature by somebody who has one, would mend it.',
    'not on record': 'Who signed certificate {certificate} is not on record.',
    'entered later':
      'Certificate {certificate} of {issuedOn} was entered on {recordedOn}, by somebody not authorised on the day of issue; who signed it then is not on record.',
    undecided:
      'The authorisation changed within {issuedOn}; the day of issue of certificate {certificate} would decide.',
    'no authorisations': 'No authorisation to sign calibrations for {issuer} is on record.',
    received:
      'Certificate {certificate} was entered by its recipient; who signs for {issuer} is its own affair.',
    'not yet': 'Nobody has signed yet.',
  },
  judge(value) {
    const { signatory, isIssued, hasAuthorisations } = value.sheet;
    const recordedOn = value.recordedAt.slice(0, 10);
    const known = {
      certificate: certificateText(value),
      issuer: value.issuer.name,
      issuedOn: dateText(value.issuedOn, value.datePrecision),
      recordedOn,
    };
    if (!isIssued) return doesNotApply('not yet', known);
    if (!value.registeredByIssuer) return doesNotApply('received', known);
    if (signatory === null) return cannotBeJudged('not on record', known, 'information');
    if (!hasAuthorisations) return cannotBeJudged('no authorisations', known, 'minor');
    const { first, last } = issued(value);
    const isHeld = (day: string) => rowInForce(signatory, day, day)?.state === 'granted';
    if (isHeld(first) && isHeld(last)) return holds('authorised', known);
    if (recordedOn > last) return cannotBeJudged('entered later', known, 'minor');
    if (isHeld(first) || isHeld(last)) return cannotBeJudged('undecided', known, 'minor');
    return fails('not authorised', known);
  },
};
