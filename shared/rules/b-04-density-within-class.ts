import { Decimal } from '#shared/decimal.ts';
import { densityLimits } from '#shared/engine/conformity/density-limits.ts';
import { densityOnRecord, ORIGIN_TEXT } from './density-on-record.ts';
import { roundedText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';
import { classOf, nominalText } from './weight-class.ts';

/**
 * The density lies within the limits of the class, so that a change of the air density cannot move the weight by more
 * than a quarter of its maximum permissible error. Where U reaches across a limit, it cannot be told.
 */
export const densityWithinClass: ValueRule = {
  id: 'B-04',
  title: 'Density within the limits of the class',
  scope: 'value',
  severity: 'major',
  verdicts: ['today'],
  sentences: {
    inside:
      'The density of {registryNo}, {density} kg/m³, lies within the limits of class {class} at {nominal}: {limits} kg/m³ (from memory).',
    outside:
      'The density of {registryNo}, {density} kg/m³ with U {expandedU} kg/m³ ({origin}), lies outside the limits of class {class} at {nominal}: {limits} kg/m³ (from memory). Correct the density, or claim a class that allows it.',
    reaches:
      'The density of {registryNo}, {density} kg/m³, has U {expandedU} kg/m³ ({origin}), which reaches across a limit of class {class} at {nominal}: {limits} kg/m³ (from memory). A smaller U would decide.',
    'no uncertainty':
      'The density of {registryNo}, {density} kg/m³, lies outside the limits of class {class} at {nominal}: {limits} kg/m³ (from memory); without its U it cannot be told by how much.',
    'no density': 'No density of {registryNo} is on record to compare with the limits of class {class}.',
    'no class': 'No class is claimed for {registryNo}.',
    'no limit': 'Class {class} has no limits of density at {nominal}.',
  },
  judge(value) {
    const weightClass = classOf(value);
    const known = {
      registryNo: value.registryNo,
      nominal: nominalText(value.nominal),
      class: weightClass ?? '',
    };
    if (weightClass === null) return doesNotApply('no class', known);
    const limits = densityLimits(weightClass, new Decimal(value.nominal));
    if (limits === null) return doesNotApply('no limit', known);
    const found = densityOnRecord(value);
    if (!found) return cannotBeJudged('no density', known, 'information');
    const [lower, upper] = limits;
    const parameters = {
      ...known,
      density: roundedText(found.value, 6),
      expandedU: found.expandedU === null ? 'not stated' : roundedText(found.expandedU, 2),
      origin: ORIGIN_TEXT[found.origin],
      limits: upper === null ? `${lower} or more` : `${lower} to ${upper}`,
    };
    const isInside = (density: number) => density >= lower && (upper === null || density <= upper);
    const [least, most] = [found.value - (found.expandedU ?? 0), found.value + (found.expandedU ?? 0)];
    if (isInside(least) && isInside(most)) return holds('inside', parameters);
    if (found.expandedU === null) return cannotBeJudged('no uncertainty', parameters, 'minor');
    const isBeyond = most < lower || (upper !== null && least > upper);
    return isBeyond ? fails('outside', parameters) : cannotBeJudged('reaches', parameters, 'minor');
  },
};
