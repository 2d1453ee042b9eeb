import { Fragment } from 'react';
import { THIN_SPACE } from '#shared/engine/quantity/format-quantity.ts';
import { unitSymbol } from '#shared/numbers/quantity-text.ts';

const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** A unit, upright, with its exponents set as such; `isSpaced` puts the thin space of a quantity before it. */
export function UnitSymbol({ unit, isSpaced = false }: { unit: string; isSpaced?: boolean }) {
  const pieces = unitSymbol(unit).split(/([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+)/);
  return (
    <>
      {isSpaced && THIN_SPACE}
      {pieces.map((piece, index) =>
        index % 2 === 0 ? <Fragment key={index}>{piece}</Fragment> : <sup key={index}>{lowered(piece)}</sup>,
      )}
    </>
  );
}

function lowered(piece: string): string {
  return piece.replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹]/g, (digit) => String(RAISED.indexOf(digit))).replace('⁻', '\u2212');
}
