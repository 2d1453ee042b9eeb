import { useEffect } from 'react';
import { useController, useFormContext, useWatch } from 'react-hook-form';
import { DecimalField } from '#src/components/ui/decimal-field.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { readDecimal } from '#src/lib/read-decimal.ts';
import type { DraftValues } from './draft-values.ts';
import { ownUnit } from './own-unit.ts';

interface MassCellProps {
  at: number;
  /** The value of the line or its U, each with a unit of its own. */
  part: 'value' | 'expandedU';
  label: string;
  isLocked: boolean;
  error: string | undefined;
}

/** A mass in its unit. A unit typed beside the number becomes the unit of the cell, so that the two never disagree. */
export function MassCell({ at, part, label, isLocked, error }: MassCellProps) {
  const { control, setValue } = useFormContext<DraftValues>();
  const { decimalMark } = usePreferences();
  const path = `lines.${at}.${part}` as const;
  const unitPath = `lines.${at}.${part === 'value' ? 'unit' : 'uUnit'}` as const;
  const { field } = useController({ control, name: path });
  const chosen = useWatch({ control, name: unitPath });
  const held = ownUnit(field.value, chosen);

  // The cell shows what is typed until the unit is complete; then number and unit go to their places.
  const read = readDecimal(held.text, decimalMark);
  const parted = !isLocked && held.text !== field.value && read.kind === 'number' ? read.value : null;
  useEffect(() => {
    if (parted === null) return;
    setValue(unitPath, held.unit, { shouldDirty: true });
    setValue(path, parted, { shouldDirty: true });
  }, [parted, held.unit, path, unitPath, setValue]);

  return (
    <DecimalField
      label={label}
      isLabelHidden
      maxLength={300}
      unit={held.unit}
      readOnly={isLocked}
      error={error}
      {...field}
      value={isLocked ? held.text : field.value}
    />
  );
}
