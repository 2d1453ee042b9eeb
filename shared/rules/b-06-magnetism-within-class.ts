import { Decimal } from '#shared/decimal.ts';
import { polarizationLimit, susceptibilityLimit } from '#shared/engine/conformity/magnetic-limits.ts';
import type { WeightClass } from '#shared/contracts/common.ts';
import { atTwo } from './density-on-record.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';
import { classOf, nominalText } from './weight-class.ts';
import type { PropertyFacts } from './weight-facts.ts';

interface Measured {
  what: string;
  property: PropertyFacts;
  limit: number;
}

/** Classes for which magnetic properties are tested as a rule; the others are judged where they were. */
const FINE: readonly WeightClass[] = ['E1', 'E2', 'F1', 'F2'];

/**
 * Magnetic susceptibility and polarisation on record lie within the limits of the class. Where U reaches across a
 * limit, it cannot be told.
 */
export const magnetismWithinClass: ValueRule = {
  id: 'B-06',
  title: 'Magnetic properties within the limits of the class',
  scope: 'value',
  severity: 'minor',
  verdicts: ['today'],
  sentences: {
    inside: 'Of {registryNo} is on record: {found}; class {class} allows it.',
    outside: '{registryNo} has {found}, beyond what class {class} allows at {nominal}.',
    reaches:
      '{registryNo} has {found}: U reaches across what class {class} allows at {nominal}; a smaller U would decide.',
    'not on record':
      'No magnetic susceptibility or polarisation of {registryNo} is on record; enter what was measured.',
    'seldom tested': 'No magnetic property of {registryNo} is on record; for class {class} few are tested.',
    'no class': 'No class is claimed for {registryNo}.',
  },
  judge(value) {
    const weightClass = classOf(value);
    const known = {
      registryNo: value.registryNo,
      nominal: nominalText(value.nominal),
      class: weightClass ?? '',
    };
    if (weightClass === null) return doesNotApply('no class', known);
    const isE = weightClass === 'E1' || weightClass === 'E2';
    const measured = measuredOf(value.weight, weightClass, value.nominal);
    if (measured.length === 0) {
      if (!FINE.includes(weightClass)) return doesNotApply('seldom tested', known);
      return cannotBeJudged('not on record', known, 'information');
    }
    const beyond = measured.filter(({ property, limit }) => Number(property.value) - u(property) > limit);
    if (beyond.length > 0) return fails('outside', withTexts(known, beyond), isE ? 'major' : 'minor');
    const open = measured.filter(({ property, limit }) => Number(property.value) + u(property) > limit);
    if (open.length > 0) return cannotBeJudged('reaches', withTexts(known, open));
    return holds('inside', withTexts(known, measured));
  },
};

function measuredOf(
  {
    susceptibility,
    polarisation,
  }: { susceptibility: PropertyFacts | null; polarisation: PropertyFacts | null },
  weightClass: WeightClass,
  nominal: string,
): Measured[] {
  const limit = susceptibilityLimit(weightClass, new Decimal(nominal));
  return [
    ...(susceptibility && limit !== null
      ? [
          {
            what: `a susceptibility of ${susceptibility.value} (limit ${limit})`,
            property: susceptibility,
            limit,
          },
        ]
      : []),
    ...(polarisation
      ? [
          {
            what: `a polarisation of ${polarisation.value} µT (limit ${polarizationLimit(weightClass)} µT)`,
            property: polarisation,
            limit: polarizationLimit(weightClass),
          },
        ]
      : []),
  ];
}

function u(property: PropertyFacts): number {
  return atTwo(property) ?? 0;
}

function withTexts(known: Record<string, string>, measured: Measured[]): Record<string, string> {
  return { ...known, found: measured.map(({ what }) => what).join(' and ') };
}
