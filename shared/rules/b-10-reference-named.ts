import { dateText, issued } from './days.ts';
import { recognitionOver } from './in-force.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/** A result names the reference results it leans on, or is itself a stated reference or a recognized stop. */
export const referenceNamed: ValueRule = {
  id: 'B-10',
  title: 'Reference result named, to certificate revision and line',
  scope: 'value',
  severity: 'block',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    named: 'Certificate {certificate} names {count} for {registryNo}, each by certificate revision and line.',
    root: '{certificate} is a stated reference ({rootKind}): it leans on nothing.',
    'recognized stop':
      'Certificate {certificate} discloses no reference; its issuer {issuer} was recognized on {issuedOn}: a legitimate stop.',
    'not named':
      'Certificate {certificate} names no reference for {registryNo}; link the result it leaned on.',
    'recognition undecided':
      'Certificate {certificate} names no reference, and the recognition of {issuer} changed within {issuedOn}; the day of issue would decide.',
  },
  judge(value) {
    const parameters = {
      certificate: certificateText(value),
      registryNo: value.registryNo,
      issuer: value.issuer.name,
      issuedOn: dateText(value.issuedOn, value.datePrecision),
      count: value.references === 1 ? 'one reference' : `${value.references} references`,
      rootKind: value.rootKind ?? '',
    };
    if (value.rootKind !== null) return doesNotApply('root', parameters);
    if (value.references > 0) return holds('named', parameters);
    if (value.registeredByIssuer) return fails('not named', parameters);
    const recognition = recognitionOver(value.recognitions, issued(value));
    if (recognition === null) return cannotBeJudged('recognition undecided', parameters);
    if (recognition.state === 'granted') return doesNotApply('recognized stop', parameters);
    // Only the issuer's own calibrations are blocked: a holder can enter no more than the certificate says.
    return fails('not named', parameters, 'critical');
  },
};
