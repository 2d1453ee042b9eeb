import { Decimal } from '#shared/decimal.ts';
import type { WeightClass } from '#shared/contracts/common.ts';
import type { Shape } from '#shared/contracts/standards.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';
import { classOf, nominalText } from './weight-class.ts';

/** Up to here a sheet or wire, from here a knob or cylinder, g. */
const SMALLEST_KNOB = 1;
/** Blocks with a rigid handle: class M from the first to the second nominal value; above that any class, g. */
const BLOCKS = [5_000, 50_000] as const;

/**
 * The shape on record is one that the class has at this nominal value. Whether a weight is of one piece and without
 * cavity is not on record and not judged.
 */
export const shapeOfClass: ValueRule = {
  id: 'B-09',
  title: 'Shape fits the class',
  scope: 'value',
  severity: 'minor',
  verdicts: ['today'],
  sentences: {
    fits: 'Class {class} has weights of {nominal} in the shape of a {shape}.',
    'does not fit':
      '{registryNo} is on record as a {shape}; class {class} has no such shape at {nominal}. Correct the shape or the class.',
    'not told':
      'The shape of {registryNo} is on record as "{shape}"; whether class {class} has it at {nominal} cannot be told.',
    'no class': 'No class is claimed for {registryNo}.',
  },
  judge(value) {
    const weightClass = classOf(value);
    const { shape } = value.weight;
    const parameters = {
      registryNo: value.registryNo,
      nominal: nominalText(value.nominal),
      class: weightClass ?? '',
      shape,
    };
    if (weightClass === null) return doesNotApply('no class', parameters);
    const fits = fitsClass(shape, weightClass, new Decimal(value.nominal));
    if (fits === null) return cannotBeJudged('not told', parameters);
    const isE = weightClass === 'E1' || weightClass === 'E2';
    return fits ? holds('fits', parameters) : fails('does not fit', parameters, isE ? 'major' : 'minor');
  },
};

/** Null where shape and class do not say. Shapes by OIML R 111-1:2004, 6, from memory. */
function fitsClass(shape: Shape, weightClass: WeightClass, nominal: Decimal): boolean | null {
  if (shape === 'sheet' || shape === 'wire') return nominal.lte(SMALLEST_KNOB);
  if (shape === 'knob' || shape === 'cylinder') return nominal.gte(SMALLEST_KNOB);
  if (shape !== 'block') return null;
  const [smallest, largest] = BLOCKS;
  if (nominal.gt(largest)) return true;
  if (!weightClass.startsWith('M')) return false;
  return nominal.gte(smallest) ? true : null;
}
