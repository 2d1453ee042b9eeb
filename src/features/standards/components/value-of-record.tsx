import { Decimal, decimalText } from '#shared/decimal.ts';
import type { StandardResponse } from '#shared/contracts/standards.ts';
import { Coverage, Quantity } from '#src/components/ui/quantity.tsx';
import { dateAsKnown } from '../history/days.ts';

type Value = NonNullable<StandardResponse['standard']['value']>;

/** The whole value, as the certificate states it: nominal plus deviation, with U where it is stated. */
export function ValueOfRecord({ nominal, value }: { nominal: string; value: Value }) {
  const whole = new Decimal(nominal).plus(value.deviation);
  return (
    <Quantity
      value={decimalText(whole)}
      expandedUncertainty={value.expandedU}
      coverageFactor={value.k}
      shownIn={whole.lt(1) ? 'mg' : 'g'}
      isOfRecord
    />
  );
}

/** What the value of record is: kind, coverage, since when. */
export function ValueNote({ sheet, value }: { sheet: StandardResponse; value: Value }) {
  const issued = sheet.history.find((one) => one.uid === value.uid)?.issuedOn;
  const isDated = value.datePrecision === 'day';
  return (
    <>
      {value.quantity}
      {value.k === null ? (
        ', U not stated'
      ) : (
        <>, {value.k === '2' ? <Coverage coverageFactor="2" /> : `k = ${value.k}`}</>
      )}
      {issued && isDated ? ` · in force since ${issued}` : ` · determined ${dateAsKnown(value)}`}
    </>
  );
}
