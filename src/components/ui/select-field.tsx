import type { ComponentProps } from 'react';
import { CONTROL_CLASS, Field, type FieldProps } from './field.tsx';

/** One choice of a list: what is kept and what is read. */
export interface Choice {
  value: string;
  label: string;
}

interface SelectFieldProps
  extends FieldProps, Omit<ComponentProps<'select'>, 'id' | 'className' | 'children'> {
  choices: readonly Choice[];
  /** First line of the list, for "nothing chosen yet"; its value is the empty text. */
  placeholder?: string;
}

/** One of a short, fixed list; a long or searched one is a `Combobox`. */
export function SelectField(props: SelectFieldProps) {
  const { label, hint, error, isOptional, isLabelHidden, className, choices, placeholder, ...select } = props;
  return (
    <Field {...{ label, hint, error, isOptional, isLabelHidden, className }}>
      {(wiring) => (
        <select {...select} {...wiring} className={CONTROL_CLASS}>
          {placeholder !== undefined && <option value="">{placeholder}</option>}
          {choices.map((choice) => (
            <option key={choice.value} value={choice.value}>
              {choice.label}
            </option>
          ))}
        </select>
      )}
    </Field>
  );
}
