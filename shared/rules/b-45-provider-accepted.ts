import { dateText, issued } from './days.ts';
import { recognitionOver } from './in-force.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

const STATED_REFERENCES = ['realization run', 'consensus value', 'earlier definition'];

/**
 * The provider of a calibration was on an accepted route when it issued the certificate: an institute under the
 * arrangement (route 1), a laboratory accredited for it under an arrangement (route 2), or another with evidence
 * that was accepted (3a, 3b). A laboratory's own calibration of its own weight is no provider's.
 */
export const providerAccepted: ValueRule = {
  id: 'B-45',
  title: 'Provider on an accepted route',
  scope: 'value',
  severity: 'critical',
  verdicts: ['conduct'],
  sentences: {
    'institute arrangement': '{issuer} took part in {arrangement} ({number}) on {issuedOn}: route 1.',
    accreditation: '{issuer} was accredited by {body} ({number}) on {issuedOn}: route 2.',
    evidence: 'Certificate {certificate} is a stop accepted with evidence: route 3.',
    'in-house': '{issuer} calibrated its own weight: there is no provider.',
    reference: 'A {rootKind} has no provider.',
    'not granted':
      'The recognition of {issuer} ({body}, {number}) was {state} when certificate {certificate} was issued on {issuedOn}.',
    'not under accreditation':
      '{issuer} was accredited on {issuedOn}, but certificate {certificate} is not claimed under its accreditation; evidence for route 3 would mend it.',
    'not recorded':
      'No recognition of {issuer} is on record for {issuedOn}, when certificate {certificate} was issued.',
    undecided:
      'The recognition of {issuer} changed within {issuedOn}; the day of issue of {certificate} would decide.',
  },
  judge(value) {
    const known = {
      certificate: certificateText(value),
      issuer: value.issuer.name,
      issuedOn: dateText(value.issuedOn, value.datePrecision),
      rootKind: value.rootKind ?? '',
    };
    if (value.rootKind !== null && STATED_REFERENCES.includes(value.rootKind))
      return doesNotApply('reference', known);
    if (value.rootKind === 'accepted stop') return holds('evidence', known);
    if (value.issuer.id === value.holder.id) return doesNotApply('in-house', known);
    const recognition = recognitionOver(value.recognitions, issued(value));
    if (recognition === null) return cannotBeJudged('undecided', known);
    if (recognition.row === null) return cannotBeJudged('not recorded', known);
    const { row, state } = recognition;
    const parameters = { ...known, body: row.body, number: row.number, arrangement: row.arrangement, state };
    if (state !== 'granted') return fails('not granted', parameters);
    // A recognized certificate was entered as one that its recognition covers.
    const isCovered = value.underAccreditation || value.rootKind === 'recognized certificate';
    if (row.kind === 'accreditation' && !isCovered) return fails('not under accreditation', parameters);
    return holds(row.kind, parameters);
  },
};
