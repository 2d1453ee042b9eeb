import { WeightClass, type MassUnit } from '#shared/contracts/common.ts';
import type { Choice } from '#src/components/ui/select-field.tsx';
import { unitSymbol } from '#shared/numbers/quantity-text.ts';

const plain = (value: string): Choice => ({ value, label: value });
const MASS_UNITS: readonly MassUnit[] = ['ug', 'mg', 'g', 'kg'];

export const QUANTITIES = ['conventional mass', 'mass'].map(plain);
export const VALUE_FORMS = [
  { value: 'deviation', label: 'deviations' },
  { value: 'whole value', label: 'whole values' },
];
export const UNIT_CHOICES = MASS_UNITS.map((unit) => ({ value: unit, label: unitSymbol(unit) }));
export const CLASSES = WeightClass.options.map(plain);
export const MEDIA = ['air', 'vacuum', 'inert gas'].map(plain);
export const STAGES = ['as found', 'as left'].map(plain);
export const USES: readonly Choice[] = [
  { value: 'certificate', label: 'value of the certificate' },
  { value: 'by notice', label: 'value changed by notice' },
  { value: 'class limit', label: 'nominal within class limits' },
  { value: 'fit', label: 'value of a fit' },
  { value: 'bracketing', label: 'value between two calibrations' },
];
