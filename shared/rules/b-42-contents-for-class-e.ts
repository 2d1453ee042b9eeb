import { densityOnRecord } from './density-on-record.ts';
import type { ResultFacts, ValueFacts } from './facts.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/**
 * A certificate that states class E1 or E2 gives the conventional mass with U and k; for class E1 also the density or
 * volume, and whether it was measured or estimated.
 */
export const contentsForClassE: ValueRule = {
  id: 'B-42',
  title: 'Certificate of class E complete',
  scope: 'value',
  severity: 'major',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    complete: 'Certificate {certificate} gives what class {class} needs: {contents}.',
    'no conventional mass':
      'Certificate {certificate} states class {class} for {registryNo} and gives no conventional mass.',
    'no uncertainty':
      'Certificate {certificate} states class {class} for {registryNo} and gives the conventional mass without U and k.',
    'no density':
      'Class E1 needs the density or volume of {registryNo}; none is on record for the day of certificate {certificate} (see B-03).',
    'no class': 'Certificate {certificate} states no class.',
    'other class': 'Certificate {certificate} states class {class}, for which fewer contents are asked.',
  },
  judge(value) {
    const known = {
      certificate: certificateText(value),
      registryNo: value.registryNo,
      class: value.class ?? '',
    };
    if (value.class === null) return doesNotApply('no class', known);
    if (value.class !== 'E1' && value.class !== 'E2') return doesNotApply('other class', known);
    const conventional = conventionalMassOf(value);
    if (!conventional) return fails('no conventional mass', known);
    if (conventional.expandedU === null || conventional.k === null) return fails('no uncertainty', known);
    if (value.class === 'E2')
      return holds('complete', { ...known, contents: 'the conventional mass with U and k' });
    const density = densityOnRecord(value);
    if (!density) return cannotBeJudged('no density', known, 'minor');
    const origin = density.origin === 'measured' ? 'measured' : 'estimated';
    const contents = `the conventional mass with U and k, and the ${density.from}, ${origin}`;
    return holds('complete', { ...known, contents });
  },
};

function conventionalMassOf(value: ValueFacts): ResultFacts | null {
  return value.quantity === 'conventional mass' ? value : value.otherKind;
}
