import { Decimal } from '#shared/decimal.ts';
import { groupBy } from '#shared/group-by.ts';
import type { ScopeLineFacts, ValueFacts } from './facts.ts';
import { rowInForce } from './in-force.ts';
import { orderOf } from './numbers.ts';

/**
 * The granted scope lines of the issuer that cover the value's nominal on a day, as known when it was issued.
 * Ends of a range belong to it. A line's method is free text and does not exclude it.
 */
export function scopeLinesOn(value: ValueFacts, day: string): ScopeLineFacts[] {
  const { nominal } = value;
  return [...groupBy(value.scope, (row) => row.line).values()]
    .map((rows) => rowInForce(rows, day, value.issuedOn))
    .filter((row) => row !== null)
    .filter(
      (row) =>
        row.state === 'granted' &&
        orderOf(nominal, row.nominalFrom) >= 0 &&
        orderOf(nominal, row.nominalTo) <= 0,
    );
}

/**
 * The best measurement capability (expanded, g, at the value's k) that the scope gives at its nominal on the day it
 * was performed: of the lines with the value's own method where there are any, else of all, the smallest. Null
 * without a line.
 */
export function bestCapability(
  value: ValueFacts,
  k: string,
): { line: ScopeLineFacts; expandedU: Decimal } | null {
  const lines = scopeLinesOn(value, value.performedEnd);
  const named = lines.filter((line) => line.method === value.method);
  const candidates = (named.length > 0 ? named : lines).map((line) => ({
    line,
    expandedU: new Decimal(line.bestUConstant)
      .plus(new Decimal(line.bestURelative).times(value.nominal))
      .times(k)
      .div(line.k)
      .toSignificantDigits(12),
  }));
  return candidates.reduce<(typeof candidates)[number] | null>(
    (best, next) => (best === null || next.expandedU.lt(best.expandedU) ? next : best),
    null,
  );
}
