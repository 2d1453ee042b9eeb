import type { Ref } from 'react';
import { PropertyOrigin } from '#shared/contracts/standards.ts';
import { Button } from '#src/components/ui/button.tsx';
import { DecimalField } from '#src/components/ui/decimal-field.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { ASSUMED_STEEL, withOrigin, type DensityEntry } from '../density.ts';
import { ORIGIN_WORDS } from '../words.ts';

interface DensityFieldsProps {
  value: DensityEntry;
  onChange: (density: DensityEntry) => void;
  /** What is wrong with a part: `value`, `expandedU`, `k`, `origin`. */
  errorOf: (part: string) => string | undefined;
  ref?: Ref<HTMLSelectElement>;
}

const ORIGINS = PropertyOrigin.options.map((value) => ({ value, label: ORIGIN_WORDS[value] }));

/** A density with its U and, always, where it comes from: nothing is assumed in silence. */
export function DensityFields({ value, onChange, errorOf, ref }: DensityFieldsProps) {
  const change = (part: Partial<NonNullable<DensityEntry>>) => value && onChange({ ...value, ...part });
  return (
    <div className="flex flex-col gap-2">
      <div className="grid grid-cols-2 items-start gap-4 min-[40rem]:grid-cols-[minmax(10rem,1.4fr)_1.2fr_1fr_5rem]">
        <SelectField
          label="Density is"
          placeholder="not known"
          choices={ORIGINS}
          ref={ref}
          value={value?.origin ?? ''}
          onChange={(event) =>
            onChange(withOrigin(value, PropertyOrigin.safeParse(event.target.value).data ?? ''))
          }
          error={errorOf('origin')}
        />
        {value && (
          <>
            <DecimalField
              label="Density"
              unit="kg/m3"
              value={value.value}
              onChange={(text) => change({ value: text })}
              error={errorOf('value')}
            />
            <DecimalField
              label="U"
              isOptional
              unit="kg/m3"
              value={value.expandedU}
              onChange={(text) => change({ expandedU: text === '' ? null : text })}
              error={errorOf('expandedU')}
            />
            <DecimalField
              label="k"
              value={value.k}
              onChange={(text) => change({ k: text === '' ? null : text })}
              error={errorOf('k')}
            />
          </>
        )}
      </div>
      <p className="text-sm text-ink-3">
        {value === null && 'Without a density nothing can be said about buoyancy. '}
        <Button weight="text" onClick={() => onChange(ASSUMED_STEEL)}>
          Assume stainless steel, <Quantity value="7950" unit="kg/m3" hidesUnit /> ±{' '}
          <Quantity value="140" unit="kg/m3" />, k = 2
        </Button>{' '}
        (common practice, no source)
      </p>
    </div>
  );
}
