import { Controller, useFormContext } from 'react-hook-form';
import type { DraftLine } from '#shared/contracts/drafts.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Checkbox } from '#src/components/ui/checkbox.tsx';
import { SelectField, type Choice } from '#src/components/ui/select-field.tsx';
import { TextField } from '#src/components/ui/text-field.tsx';
import type { DraftValues } from './draft-values.ts';
import type { KnownStandard } from './known.ts';
import { CLASSES, MEDIA, QUANTITIES, STAGES, UNIT_CHOICES } from './line-choices.ts';
import { LineReferences } from './line-references.tsx';
import { usePointAt } from './point-at.ts';

interface LineDetailProps {
  at: number;
  line: DraftLine;
  standard: KnownStandard | undefined;
  onRemove: () => void;
}

/** Everything of one result that is not in its row. */
export function LineDetail({ at, line, standard, onRemove }: LineDetailProps) {
  const { register, setValue } = useFormContext<DraftValues>();
  const errorOf = usePointAt();
  const path = `lines.${at}` as const;
  return (
    <div className="flex flex-col gap-3">
      <LineReferences at={at} line={line} standard={standard} />
      <div className="grid grid-cols-2 items-end gap-x-5 gap-y-3 sm:grid-cols-[1.4fr_1.2fr_1fr_1fr]">
        <div data-field={`${path}.quantity`}>
          <SelectField label="Quantity" choices={QUANTITIES} {...register(`${path}.quantity`)} />
        </div>
        <div data-field={`${path}.valueIs`}>
          <SelectField
            label="Value is"
            choices={[
              { value: 'deviation', label: 'a deviation' },
              { value: 'whole value', label: 'the whole value' },
            ]}
            {...register(`${path}.valueIs`)}
          />
        </div>
        <div data-field={`${path}.unit`}>
          <SelectField label="Value in" choices={UNIT_CHOICES} {...register(`${path}.unit`)} />
        </div>
        <div data-field={`${path}.uUnit`}>
          <SelectField label="U in" choices={UNIT_CHOICES} {...register(`${path}.uUnit`)} />
        </div>
        <div data-field={`${path}.coverage`}>
          <TextField
            label="Coverage"
            isOptional
            placeholder="95.45 %"
            error={errorOf(`${path}.coverage`)}
            maxLength={20}
            {...register(`${path}.coverage`)}
          />
        </div>
        <Nullable name={`${path}.class`} label="Class stated" none="none" choices={CLASSES} />
        <Nullable name={`${path}.stage`} label="Stage" none="not adjusted" choices={STAGES} />
        <div data-field={`${path}.medium`}>
          <SelectField label="Weighed in" choices={MEDIA} {...register(`${path}.medium`)} />
        </div>
      </div>
      <div className="flex flex-wrap gap-x-6 gap-y-2">
        <div data-field={`${path}.uNotStated`}>
          <Checkbox label="The certificate states no U" {...register(`${path}.uNotStated`)} />
        </div>
        <div data-field={`${path}.underAccreditation`}>
          <Checkbox label="Reported under accreditation" {...register(`${path}.underAccreditation`)} />
        </div>
        {(line.unitConfirmed || line.signConfirmed) && (
          <Button
            weight="text"
            onClick={() => {
              setValue(`${path}.unitConfirmed`, false, { shouldDirty: true });
              setValue(`${path}.signConfirmed`, false, { shouldDirty: true });
            }}
          >
            Ask again about unit and sign
          </Button>
        )}
        <span className="ml-auto">
          <Button weight="text" onClick={onRemove}>
            Remove this line
          </Button>
        </span>
      </div>
    </div>
  );
}

interface NullableProps {
  name: `lines.${number}.class` | `lines.${number}.stage`;
  label: string;
  /** What the empty choice says. */
  none: string;
  choices: readonly Choice[];
}

function Nullable({ name, label, none, choices }: NullableProps) {
  const errorOf = usePointAt();
  return (
    <div data-field={name}>
      <Controller<DraftValues, NullableProps['name']>
        name={name}
        render={({ field }) => (
          <SelectField
            label={label}
            placeholder={none}
            choices={choices}
            error={errorOf(name)}
            {...field}
            value={field.value ?? ''}
            onChange={(event) => field.onChange(event.target.value || null)}
          />
        )}
      />
    </div>
  );
}
