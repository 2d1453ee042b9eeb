import { useId, type ComponentProps, type ReactNode } from 'react';

interface CheckboxProps extends Omit<ComponentProps<'input'>, 'id' | 'type' | 'className'> {
  label: ReactNode;
  hint?: ReactNode;
  error?: string;
}

/** A statement that is true or not; its label is the statement. */
export function Checkbox({ label, hint, error, ...input }: CheckboxProps) {
  const id = useId();
  const described = [error ? `${id}-error` : '', hint ? `${id}-hint` : ''].filter(Boolean).join(' ');
  return (
    <div className="flex flex-col gap-1">
      <label className="flex min-h-6 items-start gap-2 pointer-coarse:min-h-11 pointer-coarse:items-center">
        <input
          {...input}
          type="checkbox"
          className="mt-0.5 size-4 shrink-0"
          aria-invalid={error ? true : undefined}
          aria-describedby={described || undefined}
        />
        <span>{label}</span>
      </label>
      {hint && (
        <p id={`${id}-hint`} className="ml-6 text-sm text-ink-3">
          {hint}
        </p>
      )}
      {error && (
        <p id={`${id}-error`} className="ml-6 text-sm text-broken">
          {error}
        </p>
      )}
    </div>
  );
}
