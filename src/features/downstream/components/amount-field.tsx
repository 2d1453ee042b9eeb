import { groupDigits } from '#shared/numbers/format-decimal.ts';
import { unitSymbol } from '#shared/numbers/quantity-text.ts';
import { TextField } from '#src/components/ui/text-field.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import type { ReadAmount } from '../read-amount.ts';

interface AmountFieldProps {
  suppose: 'shift' | 'raise';
  value: string;
  onChange: (value: string) => void;
  onLeft: () => void;
  read: ReadAmount;
  problem: string | undefined;
}

/** A shift or an added u with its unit, read back as it was understood. */
export function AmountField({ suppose, value, onChange, onLeft, read, problem }: AmountFieldProps) {
  const { decimalMark } = usePreferences();
  return (
    <TextField
      label={suppose === 'shift' ? 'Shift, with its unit' : 'Standard uncertainty added, with its unit'}
      placeholder="20 µg"
      autoComplete="off"
      spellCheck={false}
      isMono
      value={value}
      onChange={(event) => onChange(event.target.value)}
      onBlur={onLeft}
      hint={problem ? undefined : amountHint(read, suppose, decimalMark)}
      error={problem}
    />
  );
}

/** How the amount was read, with its sign said, so that nobody shifts the wrong way. */
function amountHint(read: ReadAmount, suppose: 'shift' | 'raise', mark: '.' | ','): string | undefined {
  if (read.kind !== 'amount') return suppose === 'shift' ? 'Minus makes it lighter.' : 'Added in quadrature.';
  const { value, unit } = read.shown;
  const text = `${groupDigits(value.replace(/^-/, ''), mark)}\u2009${unitSymbol(unit)}`;
  if (suppose === 'raise') return `Read as ${text}, added in quadrature`;
  return `Read as ${text} ${value.startsWith('-') ? 'lighter' : 'heavier'}`;
}
