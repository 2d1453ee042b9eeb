import { THIN_SPACE } from '#shared/engine/quantity/format-quantity.ts';
import type { DigitParts } from './format-decimal.ts';
import { quantityText, type NumberStyle, type QuantityInput, type QuantityText } from './quantity-text.ts';

/** A piece of a written number: digits beyond the standard uncertainty are set in the lightest ink. */
export interface InkSpan {
  text: string;
  isBeyond?: true;
  /** Set raised and smaller: an exponent. */
  isRaised?: true;
}

/** How documents write numbers, whatever a reader prefers on the screen: the same question gives the same bytes. */
export const DOCUMENT_STYLE: NumberStyle = { decimalMark: '.', uncertainty: 'plus-minus' };

/** A number in pieces, as the screen's component draws it, for drawings and documents. */
export function quantitySpans(
  input: QuantityInput,
  options: {
    style?: NumberStyle;
    hidesUncertainty?: boolean;
    hidesUnit?: boolean;
    isOfRecord?: boolean;
  } = {},
): InkSpan[] {
  const text = quantityText(input, options.style ?? DOCUMENT_STYLE);
  const spread = options.hidesUncertainty ? null : text.uncertainty;
  const isBracketed = spread !== null && text.exponent !== null;
  const unit = options.hidesUnit ? [] : unitSpans(text.unit);
  const spreadSpans = spread === null ? [] : [{ text: ' ± ' }, ...digitSpans(spread)];
  const unitBefore = options.isOfRecord && spread !== null && !isBracketed ? unit : [];
  return joined([
    ...(isBracketed ? [{ text: '(' }] : []),
    ...digitSpans(text.value),
    ...(text.bracket === null ? [] : [{ text: `(${text.bracket})` }]),
    ...unitBefore,
    ...spreadSpans,
    ...(isBracketed ? [{ text: ')' }] : []),
    ...powerSpans(text),
    ...unit,
  ]);
}

const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** A unit after its thin space, exponents raised; nothing for a bare number. */
function unitSpans(symbol: string): InkSpan[] {
  if (symbol === '') return [];
  const pieces = symbol.split(/([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+)/).map((piece, index): InkSpan => {
    if (index % 2 === 0) return { text: piece };
    const plain = piece.replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹]/g, (digit) => String(RAISED.indexOf(digit)));
    return { text: plain.replace('⁻', '\u2212'), isRaised: true };
  });
  return [{ text: THIN_SPACE }, ...pieces.filter((piece) => piece.text !== '')];
}

function powerSpans({ exponent }: QuantityText): InkSpan[] {
  if (exponent === null) return [];
  const power = String(exponent).replace('-', '\u2212');
  return [{ text: `${THIN_SPACE}×${THIN_SPACE}10` }, { text: power, isRaised: true }];
}

function digitSpans(parts: DigitParts): InkSpan[] {
  return [
    { text: parts.known },
    ...(parts.beyond === '' ? [] : [{ text: parts.beyond, isBeyond: true as const }]),
  ];
}

/** Neighbours that are set alike become one piece. */
function joined(spans: InkSpan[]): InkSpan[] {
  const whole: InkSpan[] = [];
  for (const span of spans) {
    const last = whole.at(-1);
    const isAlike = last && last.isBeyond === span.isBeyond && last.isRaised === span.isRaised;
    if (isAlike) whole[whole.length - 1] = { ...last, text: last.text + span.text };
    else whole.push(span);
  }
  return whole.filter((span) => span.text !== '');
}
