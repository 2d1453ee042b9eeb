import { Controller, useFieldArray, useFormContext } from 'react-hook-form';
import { Button } from '#src/components/ui/button.tsx';
import { DecimalField } from '#src/components/ui/decimal-field.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { DateField } from '#src/components/ui/text-field.tsx';
import { errorAt } from '#src/lib/form.ts';
import { EMPTY_TERM, type NoticeEntry } from '../notice-form.ts';

const MOST_TERMS = 10;

/** Which values the notice covers and what they get, line by line: all that is left empty means "any". */
export function TermFields() {
  const { control } = useFormContext<NoticeEntry>();
  const { fields, append, remove } = useFieldArray({ control, name: 'terms' });
  return (
    <div className="flex flex-col gap-5">
      {fields.map(({ id }, at) => (
        <Term key={id} at={at} onRemove={fields.length > 1 ? () => remove(at) : undefined} />
      ))}
      {fields.length < MOST_TERMS && (
        <p>
          <Button weight="text" onClick={() => append(EMPTY_TERM)}>
            Add a line for other values
          </Button>
        </p>
      )}
    </div>
  );
}

function Term({ at, onRemove }: { at: number; onRemove: (() => void) | undefined }) {
  const { register, formState } = useFormContext<NoticeEntry>();
  const error = (name: string) => errorAt(formState.errors, `terms.${at}.${name}`);
  return (
    <fieldset className="flex flex-col gap-3 border-t border-rule pt-3">
      <legend className="sr-only">{`Line ${at + 1}`}</legend>
      <div className="flex flex-wrap gap-x-4 gap-y-3">
        <SelectField
          label="Quantity"
          choices={[
            { value: '', label: 'either' },
            { value: 'mass', label: 'mass' },
            { value: 'conventional mass', label: 'conventional mass' },
          ]}
          {...register(`terms.${at}.quantity`)}
        />
        <DateField
          label="Calibrated from"
          isOptional
          className="w-44"
          {...register(`terms.${at}.performedFrom`)}
          error={error('performedFrom')}
        />
        <DateField
          label="Calibrated up to"
          isOptional
          className="w-44"
          {...register(`terms.${at}.performedTo`)}
          error={error('performedTo')}
        />
        <Amount at={at} name="nominalFrom" label="Nominal from" unit="g" isOptional />
        <Amount at={at} name="nominalTo" label="Nominal up to" unit="g" isOptional />
      </div>
      <Points at={at} />
      <div className="flex flex-wrap items-end justify-between gap-x-4 gap-y-2">
        <Amount
          at={at}
          name="addedU"
          label="Standard uncertainty added at 1 kg (k = 1)"
          unit="ug"
          isOptional
          hint="Added in quadrature; one effect for all of them"
        />
        {onRemove && (
          <Button weight="text" onClick={onRemove}>
            Leave this line out
          </Button>
        )}
      </div>
    </fieldset>
  );
}

/** The shift of every value covered, or a line by the day of calibration. */
function Points({ at }: { at: number }) {
  const { control, register, formState } = useFormContext<NoticeEntry>();
  const { fields, append, remove } = useFieldArray({ control, name: `terms.${at}.points` });
  const isLine = fields.length > 1;
  return (
    <div className="flex flex-col gap-2">
      {fields.map(({ id }, point) => (
        <div key={id} className="flex flex-wrap items-end gap-x-4 gap-y-2">
          {isLine && (
            <DateField
              label="Calibrated on"
              {...register(`terms.${at}.points.${point}.on`)}
              error={errorAt(formState.errors, `terms.${at}.points.${point}.on`)}
            />
          )}
          <Amount
            at={at}
            name={`points.${point}.shift`}
            label="Shift at 1 kg"
            unit="ug"
            hint={isLine ? undefined : 'Minus makes the values lighter; 0 for none'}
          />
          {isLine && (
            <Button weight="text" onClick={() => remove(point)}>
              Leave this day out
            </Button>
          )}
        </div>
      ))}
      <p>
        <Button weight="text" onClick={() => append({ on: '', shift: '' })}>
          {isLine ? 'Add a day' : 'The shift depends on the day of calibration'}
        </Button>
      </p>
    </div>
  );
}

interface AmountProps {
  at: number;
  name: 'nominalFrom' | 'nominalTo' | 'addedU' | `points.${number}.shift`;
  label: string;
  unit: string;
  hint?: string | undefined;
  isOptional?: boolean;
}

function Amount({ at, name, label, unit, hint, isOptional = false }: AmountProps) {
  const { control, formState } = useFormContext<NoticeEntry>();
  return (
    <Controller
      control={control}
      name={`terms.${at}.${name}`}
      render={({ field: { ref: _, ...field } }) => (
        <DecimalField
          {...field}
          label={label}
          unit={unit}
          hint={hint}
          isOptional={isOptional}
          className="min-w-36"
          error={errorAt(formState.errors, `terms.${at}.${name}`)}
        />
      )}
    />
  );
}
