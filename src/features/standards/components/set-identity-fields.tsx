import { WeightClass } from '#shared/contracts/common.ts';
import { Section } from '#src/components/layout/page.tsx';
import { SelectField, type Choice } from '#src/components/ui/select-field.tsx';
import { DateField, TextField } from '#src/components/ui/text-field.tsx';
import { emptyAsNull, fieldProps, monthsEntry, monthsError } from '../entries.ts';
import type { SetForm } from './member-table.tsx';

const CLASSES = WeightClass.options.map((value) => ({ value, label: value }));

interface SetIdentityFieldsProps {
  form: SetForm;
  laboratories: readonly Choice[];
  /** Called before the form takes the new class. */
  onClass: (weightClass: string | null) => void;
}

/** What is written on the lid of the box. */
export function SetIdentityFields({ form, laboratories, onClass }: SetIdentityFieldsProps) {
  const weightClass = fieldProps(form, 'class', { isNullable: true });
  return (
    <Section title="The set">
      <div className="grid grid-cols-2 items-start gap-4 min-[40rem]:grid-cols-4">
        {laboratories.length > 1 && (
          <SelectField label="Held by" choices={laboratories} {...fieldProps(form, 'laboratoryId')} />
        )}
        <TextField
          label="Registry number"
          isMono
          autoFocus
          autoComplete="off"
          hint="Letters and four digits: TV 0300"
          {...fieldProps(form, 'registryNo')}
        />
        <SelectField
          label="Class"
          isOptional
          placeholder="none"
          choices={CLASSES}
          {...weightClass}
          onChange={(event) => {
            onClass(emptyAsNull(event.target.value));
            return weightClass.onChange(event);
          }}
        />
        <TextField label="Name" autoComplete="off" {...fieldProps(form, 'name')} />
        <TextField
          label="Manufacturer"
          isOptional
          {...fieldProps(form, 'manufacturer', { isNullable: true })}
        />
        <DateField
          label="In service from"
          isOptional
          className="w-full"
          {...fieldProps(form, 'inServiceFrom', { isNullable: true })}
        />
        <TextField
          label="Recalibrated every"
          isOptional
          inputMode="numeric"
          hint="Months, 1 to 240"
          {...form.register('intervalMonths', { setValueAs: monthsEntry })}
          error={monthsError(form.formState.errors.intervalMonths)}
        />
      </div>
    </Section>
  );
}
