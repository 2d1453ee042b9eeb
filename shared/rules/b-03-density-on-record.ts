import { dateText } from './days.ts';
import { densityOnRecord, ORIGIN_TEXT } from './density-on-record.ts';
import { roundedText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';
import { classOf, isArtefact } from './weight-class.ts';

/**
 * The density (or the volume) of the weight is on record with its U and where it comes from. It matters most for
 * class E1, where the result cannot be used at another air density without it.
 */
export const densityIsOnRecord: ValueRule = {
  id: 'B-03',
  title: 'Density on record with U and source',
  scope: 'value',
  severity: 'minor',
  verdicts: ['today'],
  sentences: {
    complete:
      'The {from} of {registryNo} is on record with its U, {origin}: {density} kg/m³, U {expandedU} kg/m³.',
    none: 'No density or volume of {registryNo} is on record; enter it with its U, and whether it was measured, assumed or given by the manufacturer.',
    'no uncertainty':
      'The {from} of {registryNo}, {origin}, is on record without its U; enter it with its k.',
    later:
      'The density of {registryNo} is on record from {from} on; the one that held on {performed}, at the calibration, would decide.',
    'no artefact': 'A {kind} has no density.',
  },
  judge(value) {
    const { registryNo, weight } = value;
    const known = { registryNo, kind: weight.kind };
    if (!isArtefact(value)) return doesNotApply('no artefact', known);
    const severity = classOf(value) === 'E1' ? 'major' : 'minor';
    const found = densityOnRecord(value);
    if (!found) {
      if (weight.densityOnlyFrom === null) return fails('none', known, severity);
      const performed = dateText(value.performedEnd, value.datePrecision);
      return cannotBeJudged('later', { ...known, from: weight.densityOnlyFrom, performed });
    }
    const parameters = { ...known, from: found.from, origin: ORIGIN_TEXT[found.origin] };
    if (found.expandedU === null) return fails('no uncertainty', parameters, severity);
    const numbers = { density: roundedText(found.value, 6), expandedU: roundedText(found.expandedU, 2) };
    return holds('complete', { ...parameters, ...numbers });
  },
};
