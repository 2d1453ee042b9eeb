import { THIN_SPACE } from '#shared/engine/quantity/format-quantity.ts';
import type { DigitParts } from '#shared/numbers/format-decimal.ts';
import { usePreferences } from '#src/lib/preferences.ts';
import { quantityText, type QuantityInput } from '#shared/numbers/quantity-text.ts';
import { UnitSymbol } from './unit-symbol.tsx';

interface QuantityProps extends QuantityInput {
  /** Leaves U to a column or a line of its own; the value is still rounded by it. */
  hidesUncertainty?: boolean;
  /** Leaves the unit to the table head. */
  hidesUnit?: boolean;
  /** The value of record at the head of a screen: the unit stands after the value and after U, as on a certificate. */
  isOfRecord?: boolean;
  /** `serif` for values of record and plates, `mono` for readings. @default 'inherit', the face around it */
  face?: 'serif' | 'mono' | 'inherit';
  className?: string;
}

const FACES = { serif: 'font-serif text-[1.1em]', mono: 'font-mono', inherit: '' };

/**
 * Draws a number, everywhere in the product: grouped by thin spaces, rounded by its uncertainty, the digits
 * beyond the standard uncertainty in the lightest ink, written as this reader prefers.
 */
export function Quantity({
  hidesUncertainty,
  hidesUnit,
  isOfRecord,
  face = 'inherit',
  className = '',
  ...input
}: QuantityProps) {
  const preferred = usePreferences();
  const style = hidesUncertainty ? { ...preferred, uncertainty: 'plus-minus' as const } : preferred;
  const text = quantityText(input, style);
  const spread = hidesUncertainty ? null : text.uncertainty;
  const isBracketed = spread !== null && text.exponent !== null;
  const hasUnit = text.unit !== '' && !hidesUnit;
  return (
    <span className={`whitespace-nowrap ${FACES[face]} ${className}`}>
      {isBracketed && '('}
      <Digits parts={text.value} />
      {text.bracket !== null && <span>({text.bracket})</span>}
      {spread !== null && (
        <>
          {hasUnit && isOfRecord && !isBracketed && <UnitSymbol unit={text.unit} isSpaced />}
          {' ± '}
          <Digits parts={spread} />
        </>
      )}
      {isBracketed && ')'}
      {text.exponent !== null && (
        <>
          {`${THIN_SPACE}×${THIN_SPACE}10`}
          <sup>{String(text.exponent).replace('-', '\u2212')}</sup>
        </>
      )}
      {hasUnit && <UnitSymbol unit={text.unit} isSpaced />}
    </span>
  );
}

function Digits({ parts }: { parts: DigitParts }) {
  return (
    <>
      {parts.known}
      {parts.beyond !== '' && <span className="font-normal text-ink-3">{parts.beyond}</span>}
    </>
  );
}

interface CoverageProps {
  /** Coverage factor k of the U shown. */
  coverageFactor: string | number;
  /** Coverage probability, percent. @default 95 */
  probability?: string | number;
}

/** Says what the number after the plus-minus sign, or in the brackets, stands for. */
export function Coverage({ coverageFactor, probability = 95 }: CoverageProps) {
  const { uncertainty, decimalMark } = usePreferences();
  if (uncertainty === 'concise') return <>standard uncertainty in brackets</>;
  const k = String(coverageFactor).replace('.', decimalMark);
  return <span className="whitespace-nowrap">{`k = ${k}, ${probability}${THIN_SPACE}%`}</span>;
}
