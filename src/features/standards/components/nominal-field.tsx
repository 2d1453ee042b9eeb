import { useState, type ComponentProps } from 'react';
import { CONTROL_CLASS, Field, type FieldProps } from '#src/components/ui/field.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import { isGrams, nominalEntry, readNominal } from '../nominal.ts';

interface NominalFieldProps
  extends
    FieldProps,
    Omit<ComponentProps<'input'>, 'id' | 'className' | 'type' | 'value' | 'defaultValue' | 'onChange'> {
  /** Grams as text, or what was typed while it cannot be read, or empty. */
  value: string | null | undefined;
  /** Gets grams as soon as the entry can be read, the bare entry otherwise. */
  onChange: (value: string) => void;
}

/** A nominal typed as it is engraved, "1 kg" or "500 mg"; it hands on grams and guesses no unit. */
export function NominalField(props: NominalFieldProps) {
  const { label, hint, error, isOptional, isLabelHidden, className, value, onChange, onBlur, ...input } =
    props;
  const { decimalMark } = usePreferences();
  const [typed, setTyped] = useState(() => shown(value ?? '', decimalMark));
  const [isLeft, setLeft] = useState(true);
  const read = readNominal(typed, decimalMark);
  const held = nominalEntry(typed, decimalMark);
  // What is held outside wins after a reset, a restored draft or a pasted row.
  const [heldOutside, setHeldOutside] = useState(value ?? '');
  if ((value ?? '') !== heldOutside) {
    setHeldOutside(value ?? '');
    if ((value ?? '') !== held) setTyped(shown(value ?? '', decimalMark));
  }
  // While it is being typed an entry is not wrong yet, unless the form already said so.
  const problem = read.kind === 'unreadable' && (isLeft || error) ? read.why : error;
  return (
    <Field {...{ label, hint, isOptional, isLabelHidden, className }} error={problem}>
      {(wiring) => (
        <input
          autoComplete="off"
          spellCheck={false}
          {...input}
          {...wiring}
          type="text"
          value={typed}
          onFocus={() => setLeft(false)}
          onBlur={(event) => {
            setLeft(true);
            if (read.kind === 'nominal') setTyped(nominalText(read.grams, decimalMark));
            onBlur?.(event);
          }}
          onChange={(event) => {
            setTyped(event.target.value);
            onChange(nominalEntry(event.target.value, decimalMark));
          }}
          className={`${CONTROL_CLASS} text-right font-mono`}
        />
      )}
    </Field>
  );
}

/** Grams from outside as one says them; anything else is an entry still being written. */
function shown(value: string, decimalMark: '.' | ','): string {
  return isGrams(value) ? nominalText(value, decimalMark) : value;
}
