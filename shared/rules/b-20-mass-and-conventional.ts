import { Decimal } from '#shared/decimal.ts';
import { conventionalMass } from '#shared/engine/air/conventional-mass.ts';
import type { DensityFacts, ResultFacts, ValueFacts } from './facts.ts';
import { amountText, certificateText, halfDigit } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/**
 * Where a certificate gives mass and conventional mass, the two fulfil their identity (OIML D 28) within the rounding
 * of both and the U of the density on record.
 */
export const massAndConventional: ValueRule = {
  id: 'B-20',
  title: 'Mass and conventional mass agree',
  scope: 'value',
  severity: 'major',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    agree: 'Mass and conventional mass on certificate {certificate} agree within rounding.',
    'agree by density':
      'Mass and conventional mass on certificate {certificate} differ by {gap} from their identity, which the U of the density of {registryNo} covers.',
    disagree:
      'Mass and conventional mass on certificate {certificate} differ by {gap} from their identity at {density} kg/m³; check the density of {registryNo} or the two values.',
    'no mass':
      'By certificate {certificate} {registryNo} would have no mass above zero; check the deviation and its unit.',
    one: 'Certificate {certificate} states {kind} only.',
    'no density':
      'Certificate {certificate} states both kinds; the density of {registryNo} is not on record to compare them.',
  },
  judge(value) {
    const parameters = {
      certificate: certificateText(value),
      registryNo: value.registryNo,
      kind: value.quantity,
      density: value.density?.value ?? '',
    };
    if (value.otherKind === null) return doesNotApply('one', parameters);
    if (value.density === null) return cannotBeJudged('no density', parameters);
    const isMass = ({ deviation }: ResultFacts) => new Decimal(value.nominal).plus(deviation).gt(0);
    if (!isMass(value) || !isMass(value.otherKind)) return fails('no mass', parameters);
    const gap = gapOf(value, value.otherKind, value.density);
    const texts = { ...parameters, gap: amountText(gap, value) };
    const rounding = halfDigit(value).plus(halfDigit(value.otherKind));
    if (gap.lte(rounding)) return holds('agree', texts);
    return gap.lte(rounding.plus(roomOfDensity(value.nominal, value.density)))
      ? holds('agree by density', texts, 'information')
      : fails('disagree', texts);
  },
};

/** How far conventional mass is from the one that the mass and the density give, g. */
function gapOf(value: ValueFacts, other: ResultFacts, density: DensityFacts): Decimal {
  const [mass, conventional] = value.quantity === 'mass' ? [value, other] : [other, value];
  const expected = conventionalMass({
    mass: new Decimal(value.nominal).plus(mass.deviation),
    density: Number(density.value),
  });
  return expected.minus(value.nominal).minus(conventional.deviation).abs();
}

/** What the U of the density lets the identity move: m x 1.2 U / rho^2, g. */
function roomOfDensity(nominal: string, density: DensityFacts): Decimal {
  return new Decimal(nominal)
    .times('1.2')
    .times(density.expandedU ?? '0')
    .div(new Decimal(density.value).pow(2));
}
