import { Decimal } from '#shared/decimal.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';
import { classOf, nominalText } from './weight-class.ts';

/**
 * The nominal value of a weight of a class is 1, 2 or 5 times a power of ten. A weight without class may be made for
 * a purpose of its own; the register has no place to say so.
 */
export const nominalInSeries: ValueRule = {
  id: 'B-02',
  title: 'Nominal value of the series 1, 2, 5',
  scope: 'value',
  severity: 'minor',
  verdicts: ['today'],
  sentences: {
    'in series': 'The nominal value of {registryNo}, {nominal}, belongs to the series 1, 2, 5.',
    outside:
      'The nominal value of {registryNo}, {nominal}, does not belong to the series 1, 2, 5, and class {class} is claimed for it; enter it without class, or correct the nominal value.',
    'no class':
      'The nominal value of {registryNo}, {nominal}, does not belong to the series 1, 2, 5; no class is claimed for it, so that it may be a special weight.',
    'no weight': 'A {kind} is no weight of a series.',
  },
  judge(value) {
    const weightClass = classOf(value);
    const parameters = {
      registryNo: value.registryNo,
      nominal: nominalText(value.nominal),
      class: weightClass ?? '',
      kind: value.weight.kind,
    };
    if (value.weight.kind !== 'weight') return doesNotApply('no weight', parameters);
    if (isOfSeries(value.nominal)) return holds('in series', parameters);
    return weightClass === null ? cannotBeJudged('no class', parameters) : fails('outside', parameters);
  },
};

function isOfSeries(nominal: string): boolean {
  const grams = new Decimal(nominal);
  const leading = grams.times(new Decimal(10).pow(-grams.e));
  return [1, 2, 5].some((factor) => leading.eq(factor));
}
