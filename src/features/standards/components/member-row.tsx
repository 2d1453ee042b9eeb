import { Controller, useWatch } from 'react-hook-form';
import { Shape } from '#shared/contracts/standards.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { Cell, Row } from '#src/components/ui/table.tsx';
import { TextField } from '#src/components/ui/text-field.tsx';
import { errorAt } from '#src/lib/form.ts';
import { emptyAsNull } from '../entries.ts';
import { memberNo } from '../series.ts';
import { cellProblem, type MemberColumn } from '../set-entries.ts';
import { errorLimit, limitUnit } from './error-limit-note.tsx';
import type { SetForm } from './member-table.tsx';
import { NominalField } from './nominal-field.tsx';

const SHAPES = Shape.options.map((value) => ({ value, label: value }));

interface MemberRowProps {
  form: SetForm;
  index: number;
  onRemove: () => void;
}

/** One weight of the set. */
export function MemberRow({ form, index, onRemove }: MemberRowProps) {
  const path = `members.${index}` as const;
  const [setNo, weightClass, nominal] = useWatch({
    control: form.control,
    name: ['registryNo', 'class', `${path}.nominal`],
  });
  const { errors } = form.formState;
  const errorOf = (column: MemberColumn) => {
    const message = errorAt(errors, `${path}.${column}`);
    return message && cellProblem(form.getValues(path), column, message);
  };
  const limit = errorLimit(weightClass, nominal ?? '');
  const number = memberNo(setNo.trim() || 'set', index);
  return (
    <Row>
      <Cell isHeading isMono>
        {number}
      </Cell>
      <Cell>
        <Controller
          name={`${path}.nominal`}
          control={form.control}
          render={({ field }) => (
            <NominalField
              {...field}
              label={`Nominal of ${number}`}
              isLabelHidden
              className="ml-auto w-28"
              error={errorOf('nominal')}
            />
          )}
        />
      </Cell>
      <Cell>
        <TextField
          label={`Marking of ${number}`}
          isLabelHidden
          autoComplete="off"
          className="w-36"
          error={errorOf('marking')}
          {...form.register(`${path}.marking`)}
        />
      </Cell>
      <Cell>
        <TextField
          label={`Serial of ${number}`}
          isLabelHidden
          isMono
          autoComplete="off"
          className="w-28"
          error={errorOf('serial')}
          {...form.register(`${path}.serial`, { setValueAs: emptyAsNull })}
        />
      </Cell>
      <Cell>
        <SelectField
          label={`Shape of ${number}`}
          isLabelHidden
          className="w-28"
          choices={SHAPES}
          error={errorOf('shape')}
          {...form.register(`${path}.shape`)}
        />
      </Cell>
      <Cell align="right" className="text-ink-2">
        {limit ? (
          <>
            <span className="font-serif">±</span>
            <Quantity value={limit} shownIn={limitUnit(limit)} />
          </>
        ) : (
          ''
        )}
      </Cell>
      <Cell>
        <Button weight="text" aria-label={`Remove ${number}`} onClick={onRemove}>
          Remove
        </Button>
      </Cell>
    </Row>
  );
}
