import { useId, type ReactNode } from 'react';

/** What every labelled field takes; `Field` owns the label, the hint, the error and how they are announced. */
export interface FieldProps {
  label: ReactNode;
  /** One line below the control: what is wanted, or how the entry was read. */
  hint?: ReactNode;
  /** What is wrong and what would mend it; `undefined` when nothing is. */
  error?: string;
  /** Says "optional" after the label; fields are required unless they say so. */
  isOptional?: boolean;
  /** Keeps the label for screen readers only, where a table head already names the column. */
  isLabelHidden?: boolean;
  /** Classes for the outer element: width and place in a grid, nothing else. */
  className?: string;
}

/** The attributes that tie a control to its label, hint and error. */
export interface ControlWiring {
  id: string;
  'aria-invalid': true | undefined;
  'aria-describedby': string | undefined;
}

/** The look of every text-like control: an ink line to write on, as on a paper form. */
export const CONTROL_CLASS =
  'w-full min-h-8 border-0 border-b border-ink-3 bg-raised px-2 py-1 text-ink placeholder:text-ink-3 hover:border-ink pointer-coarse:min-h-11 aria-invalid:border-broken aria-invalid:border-b-2 disabled:bg-transparent disabled:text-ink-2 read-only:bg-transparent';

interface Props extends FieldProps {
  children: (wiring: ControlWiring) => ReactNode;
}

/** Label above, control, then hint and error; used by every field of the kit. */
export function Field({ label, hint, error, isOptional, isLabelHidden, className = '', children }: Props) {
  const id = useId();
  const described = [error ? `${id}-error` : '', hint ? `${id}-hint` : ''].filter(Boolean).join(' ');
  return (
    <div className={`flex min-w-0 flex-col gap-1 ${className}`}>
      <label htmlFor={id} className={isLabelHidden ? 'sr-only' : 'text-sm text-ink-2'}>
        {label}
        {isOptional && <span className="text-ink-3"> · optional</span>}
      </label>
      {children({ id, 'aria-invalid': error ? true : undefined, 'aria-describedby': described || undefined })}
      {hint && (
        <p id={`${id}-hint`} className="text-sm text-ink-3">
          {hint}
        </p>
      )}
      {error && (
        <p id={`${id}-error`} className="text-sm text-broken">
          {error}
        </p>
      )}
    </div>
  );
}
