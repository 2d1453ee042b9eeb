import { useState, type ComponentProps } from 'react';
import { groupDigits } from '#shared/numbers/format-decimal.ts';
import { usePreferences } from '#src/lib/preferences.ts';
import { readDecimal } from '#src/lib/read-decimal.ts';
import { unitSymbol } from '#shared/numbers/quantity-text.ts';
import { CONTROL_CLASS, Field, type FieldProps } from './field.tsx';

interface DecimalFieldProps
  extends
    FieldProps,
    Omit<ComponentProps<'input'>, 'id' | 'className' | 'type' | 'value' | 'defaultValue' | 'onChange'> {
  /** Plain decimal text, or what was typed while it cannot be read, or empty. */
  value: string | null | undefined;
  /** Gets the canonical text as soon as the entry can be read, the bare entry otherwise. */
  onChange: (value: string) => void;
  /** Unit code or symbol, shown after the control. */
  unit?: string;
}

/**
 * A number, typed as a metrologist types it: spaces between digits, point or comma, either minus sign. It says
 * how the entry was read and hands on plain decimal text, so that no digit and no sign is guessed in silence.
 */
export function DecimalField(props: DecimalFieldProps) {
  const { label, hint, error, isOptional, isLabelHidden, className, value, onChange, unit, ...input } = props;
  const { decimalMark } = usePreferences();
  const [typed, setTyped] = useState(() => shown(value ?? '', decimalMark));
  const read = readDecimal(typed, decimalMark);
  const held = read.kind === 'number' ? read.value : typed.trim();
  // The form was reset or restored from outside: what is held there wins over what was typed here.
  const [heldOutside, setHeldOutside] = useState(value ?? '');
  if ((value ?? '') !== heldOutside) {
    setHeldOutside(value ?? '');
    if ((value ?? '') !== held) setTyped(shown(value ?? '', decimalMark));
  }
  const problem = read.kind === 'unreadable' ? read.why : undefined;
  return (
    <Field
      {...{ label, isOptional, isLabelHidden, className }}
      hint={reading(read, typed, decimalMark, unit) ?? hint}
      error={problem ?? error}
    >
      {(wiring) => (
        <span className="flex items-baseline gap-1.5">
          <input
            autoComplete="off"
            spellCheck={false}
            {...input}
            {...wiring}
            type="text"
            inputMode="decimal"
            value={typed}
            onChange={(event) => {
              setTyped(event.target.value);
              const next = readDecimal(event.target.value, decimalMark);
              onChange(next.kind === 'number' ? next.value : event.target.value.trim());
            }}
            className={`${CONTROL_CLASS} text-right font-mono`}
          />
          {unit && <span className="shrink-0 font-serif text-ink-2">{unitSymbol(unit)}</span>}
        </span>
      )}
    </Field>
  );
}

function shown(value: string, decimalMark: '.' | ','): string {
  return readDecimal(value, '.').kind === 'number' ? groupDigits(value, decimalMark) : value;
}

/** Says how the entry was read, but only where it differs from what stands in the field. */
function reading(
  read: ReturnType<typeof readDecimal>,
  typed: string,
  decimalMark: '.' | ',',
  unit: string | undefined,
): string | undefined {
  if (read.kind !== 'number') return undefined;
  const text = groupDigits(read.value, decimalMark);
  const plain = (entry: string): string => entry.trim().replace(/\s/g, ' ').replace(/^-/, '\u2212');
  if (plain(text) === plain(typed)) return undefined;
  return `Read as ${text}${unit ? `\u2009${unitSymbol(unit)}` : ''}`;
}
