import { Decimal } from '#shared/decimal.ts';
import { formatQuantity } from '#shared/engine/quantity/format-quantity.ts';
import { UNIT_DEFINITIONS } from '#shared/engine/quantity/units.ts';
import { deviationUnit } from '#shared/numbers/format-decimal.ts';
import type { ResultFacts } from './facts.ts';

/**
 * Works out a text of a result once: a dozen rules quote the same value, and facts never change after their assembly.
 */
function oncePerResult(text: (result: ResultFacts) => string): (result: ResultFacts) => string {
  const known = new WeakMap<ResultFacts, string>();
  return (result) => {
    const before = known.get(result);
    if (before !== undefined) return before;
    const made = text(result);
    known.set(result, made);
    return made;
  };
}

/** Standard uncertainty in g as the certificate states it, U/k; null where U or k is not stated. */
export function statedU(result: Pick<ResultFacts, 'expandedU' | 'k'>): number | null {
  if (result.expandedU === null || result.k === null) return null;
  return Number(result.expandedU) / Number(result.k);
}

/** A deviation in g as a number, for comparisons against an uncertainty only. */
export function deviationOf(result: Pick<ResultFacts, 'deviation'>): number {
  return Number(result.deviation);
}

const PLAIN = /^-?[\d.]+$/;

/** Grams in the reported unit. */
export function inReportedUnit(result: Pick<ResultFacts, 'reportedUnit'>, grams: string | number): Decimal {
  const { exponent } = UNIT_DEFINITIONS[result.reportedUnit];
  // A plain text with an exponent behind it is read at once, where a product would be a second decimal and a third.
  return typeof grams === 'string' && PLAIN.test(grams)
    ? new Decimal(`${grams}e${-exponent}`)
    : new Decimal(grams).times(`1e${-exponent}`);
}

/**
 * The order of two plain decimals, as a sign. Doubles are rounded in order, so they decide unless they are equal: only
 * then the decimals are read.
 */
export function orderOf(a: string, b: string): number {
  const difference = Number(a) - Number(b);
  return difference === 0 ? new Decimal(a).cmp(b) : Math.sign(difference);
}

/** Half of the value's last printed digit, g. */
export function halfDigit(result: Pick<ResultFacts, 'reportedUnit' | 'reportedDecimals'>): Decimal {
  return new Decimal(halfDigitText(result, result.reportedDecimals));
}

/** Half of U's last printed digit, g. */
export function halfDigitOfU(result: ResultFacts): Decimal {
  return new Decimal(halfDigitText(result, decimalsOfU(result) ?? 0));
}

/**
 * Decimals of U in the reported unit: as kept, else the fewest that write it. Null where U is not stated. Decimals
 * that cannot write U belong to another unit and are not believed.
 */
export function decimalsOfU(result: ResultFacts): number | null {
  if (result.expandedU === null) return null;
  const needed = inReportedUnit(result, result.expandedU).decimalPlaces();
  const kept = result.reportedUDecimals;
  return kept === null || kept < needed ? needed : kept;
}

/** Whether the printed decimals of U are on record and can be those. */
export function isUDecimalsKept(result: ResultFacts): boolean {
  return result.reportedUDecimals !== null && decimalsOfU(result) === result.reportedUDecimals;
}

/** U in the reported unit with its printed decimals, plain text; U has to be stated. */
export function printedU(result: ResultFacts): string {
  return inReportedUnit(result, result.expandedU ?? '0').toFixed(decimalsOfU(result) ?? 0);
}

/**
 * Standard uncertainty of the difference of two results, g, with the rounding of both values (rectangular over the
 * last digit). Null where either states no U. A covariance that would leave nothing is not believed.
 * @param covariance g2; null: taken as 0, which for results that share an ancestor overstates
 */
export function uOfDifference(a: ResultFacts, b: ResultFacts, covariance: number | null): number | null {
  const [ua, ub] = [statedU(a), statedU(b)];
  if (ua === null || ub === null) return null;
  const half = (result: ResultFacts) => Number(halfDigitText(result, result.reportedDecimals));
  const rounding = (half(a) ** 2 + half(b) ** 2) / 3;
  const independent = ua ** 2 + ub ** 2;
  const correlated = independent - 2 * (covariance ?? 0);
  return Math.sqrt((correlated > 0 ? correlated : independent) + rounding);
}

/** A deviation for reading, in the unit and decimals of its certificate. */
export const valueText = oncePerResult((result) =>
  quantityText(inReportedUnit(result, result.deviation), result.reportedUnit, result.reportedDecimals, true),
);

/** U for reading, in the reported unit; "not stated" where there is none. */
export const expandedUText = oncePerResult((result) => {
  if (result.expandedU === null) return 'not stated';
  return quantityText(
    inReportedUnit(result, result.expandedU),
    result.reportedUnit,
    decimalsOfU(result)!,
    false,
  );
});

/**
 * A deviation for reading in the unit that screens and drawings choose by its size, so that what is said of a value
 * looks like the value; with the digits of its certificate.
 */
export const shownValueText = oncePerResult((result) => {
  const unit = deviationUnit(result.deviation, result.expandedU);
  const steps = UNIT_DEFINITIONS[unit].exponent - UNIT_DEFINITIONS[result.reportedUnit].exponent;
  const decimals = Math.max(0, result.reportedDecimals + steps);
  return quantityText(inReportedUnit({ reportedUnit: unit }, result.deviation), unit, decimals, true);
});

/** Below this no unit has an amount left: what is smaller is written as 0. */
const NOTHING = '1e-30';

/** A computed amount in g for reading, to two significant digits in the unit of a result. */
export function amountText(grams: number | Decimal, like: Pick<ResultFacts, 'reportedUnit'>): string {
  const exact = inReportedUnit(like, new Decimal(grams).toFixed()).toSignificantDigits(2);
  const amount = exact.abs().lt(NOTHING) ? new Decimal(0) : exact;
  const decimals = amount.isZero() ? 0 : Math.max(0, 1 - amount.e);
  return quantityText(amount, like.reportedUnit, decimals, false);
}

/** A fraction as a percentage for reading, to two significant digits unless said otherwise. */
export function percentText(fraction: number, digits = 2): string {
  return `${new Decimal(fraction).times(100).toSignificantDigits(digits).toFixed()} %`;
}

/** A ratio for reading, to two significant digits. */
export function ratioText(ratio: number): string {
  return new Decimal(ratio).toSignificantDigits(2).toFixed();
}

/** A plain number for reading, to so many significant digits. */
export function roundedText(value: number, digits: number): string {
  return new Decimal(value).toSignificantDigits(digits).toFixed();
}

/** A certificate for reading; the revision is named from the second on. */
export function certificateText(result: { certificateNo: string; revisionN: number }): string {
  return result.revisionN > 1
    ? `${result.certificateNo}, revision ${result.revisionN}`
    : result.certificateNo;
}

function quantityText(
  value: Decimal,
  unit: ResultFacts['reportedUnit'],
  decimals: number,
  showPlus: boolean,
): string {
  return formatQuantity({ value, unit, decimals, showPlus }).text;
}

function halfDigitText(result: Pick<ResultFacts, 'reportedUnit'>, decimals: number): string {
  return `5e${UNIT_DEFINITIONS[result.reportedUnit].exponent - decimals - 1}`;
}
