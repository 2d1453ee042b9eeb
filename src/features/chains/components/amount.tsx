import { quantityText } from '#shared/numbers/quantity-text.ts';
import { belowDigits, twoDigits } from '#shared/numbers/small-amount.ts';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { usePreferences } from '#src/lib/preferences.ts';

interface AmountProps {
  /** Grams. */
  grams: string;
  /** `deviation` shows its sign; `uncertainty` is a standard uncertainty. */
  kind: 'deviation' | 'uncertainty';
}

/** An amount that no U gives its digits: two significant ones, and "below 0.01 µg" rather than a zero that it is not. */
export function Amount({ grams, kind }: AmountProps) {
  const { decimalMark } = usePreferences();
  const value = twoDigits(grams);
  if (value === null)
    return <span className="whitespace-nowrap">{`below 0.01\u2009µg`.replace('.', decimalMark)}</span>;
  if (kind === 'deviation') return <Quantity value={value} kind={kind} shownIn="auto" />;
  return <Quantity value={value} kind={kind} coverageFactor={1} shownIn="auto" />;
}

interface ShiftProps {
  /** Grams, signed. */
  grams: string;
  /** U of the value that shifts, grams, with its k. */
  expandedU: string | null;
  k: string | null;
}

/** A shift to the digits that the U of its value gives; where those are zeros and it is none, what it is below. */
export function Shift({ grams, expandedU, k }: ShiftProps) {
  const preferred = usePreferences();
  if (expandedU === null) return <Amount grams={grams} kind="deviation" />;
  const input = {
    value: grams,
    expandedUncertainty: expandedU,
    coverageFactor: k,
    kind: 'deviation',
    shownIn: 'auto',
  } as const;
  const below = belowDigits(grams, quantityText(input, { ...preferred, uncertainty: 'plus-minus' }));
  if (below !== null) return <span className="whitespace-nowrap">{below}</span>;
  return <Quantity {...input} hidesUncertainty />;
}
