import type { ComponentProps } from 'react';
import { CONTROL_CLASS, Field, type FieldProps } from './field.tsx';

interface TextFieldProps extends FieldProps, Omit<ComponentProps<'input'>, 'id' | 'className' | 'type'> {
  /** @default 'text' */
  type?: 'text' | 'email' | 'password' | 'search' | 'url';
  /** Sets the entry in the mono face: registry numbers, markings, hashes. */
  isMono?: boolean;
}

/** One line of text. Takes what `form.register(name)` returns. */
export function TextField(props: TextFieldProps) {
  const { label, hint, error, isOptional, isLabelHidden, className, isMono, ...input } = props;
  return (
    <Field {...{ label, hint, error, isOptional, isLabelHidden, className }}>
      {(wiring) => (
        <input
          type="text"
          {...input}
          {...wiring}
          className={`${CONTROL_CLASS} ${isMono ? 'font-mono' : ''}`}
        />
      )}
    </Field>
  );
}

interface TextareaProps extends FieldProps, Omit<ComponentProps<'textarea'>, 'id' | 'className'> {}

/** Several lines of text. */
export function Textarea(props: TextareaProps) {
  const { label, hint, error, isOptional, isLabelHidden, className, ...area } = props;
  return (
    <Field {...{ label, hint, error, isOptional, isLabelHidden, className }}>
      {(wiring) => <textarea rows={3} {...area} {...wiring} className={`${CONTROL_CLASS} resize-y`} />}
    </Field>
  );
}

/** A calendar day, typed as ISO 8601 text: `2025-02-20`. The schema of the form knows the calendar. */
export function DateField(props: Omit<TextFieldProps, 'type' | 'isMono'>) {
  return (
    <TextField
      inputMode="numeric"
      autoComplete="off"
      maxLength={10}
      placeholder="YYYY-MM-DD"
      {...props}
      type="text"
      isMono
      className={props.className ?? 'w-36'}
    />
  );
}
