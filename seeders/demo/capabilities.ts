import { Decimal } from '#shared/decimal.ts';
import type { WeightClass } from '#shared/contracts/common.ts';
import { maximumPermissibleError } from '#shared/engine/conformity/maximum-permissible-error.ts';
import { INSTITUTE, SECOND_LEVEL, THIRD_LEVEL } from './laboratories.ts';
import type { Quantity } from './weight.ts';

/** A line of a scope: best U = constant + relative x nominal, k = 2, both ends of the range included. */
export interface ScopeRange {
  quantity: Quantity;
  /** g. */
  from: string;
  to: string;
  constant: string;
  relative: number;
}

/** One range for each decade, its U running straight between shares of the class limits at the two ends. */
function scopeOf(
  quantity: Quantity,
  weightClass: WeightClass,
  share: number,
  [smallest, largest]: [string, string],
): ScopeRange[] {
  const ranges: ScopeRange[] = [];
  for (let decade = -3; decade <= 4; decade += 1) {
    const from = Decimal.max(new Decimal(10).pow(decade), smallest);
    const to = Decimal.min(new Decimal(10).pow(decade).times(5), largest);
    if (from.gt(to)) continue;
    const [low, high] = [from, to].map((nominal) => limitAt(weightClass, nominal).times(share)) as [
      Decimal,
      Decimal,
    ];
    const slope = from.eq(to) ? new Decimal(0) : high.minus(low).div(to.minus(from));
    const relative = slope.toSignificantDigits(3);
    ranges.push({
      quantity,
      from: from.toFixed(),
      to: to.toFixed(),
      constant: low.minus(relative.times(from)).toDecimalPlaces(12).toFixed(),
      relative: relative.toNumber(),
    });
  }
  return ranges;
}

function limitAt(weightClass: WeightClass, nominal: Decimal): Decimal {
  const limit = maximumPermissibleError(weightClass, nominal);
  if (!limit) throw new Error(`Class ${weightClass} has no limit at ${nominal.toFixed()} g`);
  return limit.div(1000);
}

/** Largest nominal of the second level; one of them stops short of 20 kg. */
const REACH: Record<string, string> = { KW: '10000' };

/** Scopes by laboratory. */
export const SCOPES: ReadonlyMap<string, ScopeRange[]> = new Map([
  [
    INSTITUTE,
    [
      ...scopeOf('mass', 'E1', 0.12, ['0.001', '20000']),
      ...scopeOf('conventional mass', 'E1', 0.12, ['0.001', '20000']),
    ],
  ],
  ...SECOND_LEVEL.map((code): [string, ScopeRange[]] => [
    code,
    scopeOf('conventional mass', 'E2', 0.14, ['0.001', REACH[code] ?? '20000']),
  ]),
  ...THIRD_LEVEL.map((code): [string, ScopeRange[]] => [
    code,
    scopeOf('conventional mass', 'M1', 0.15, ['1', '20000']),
  ]),
]);

/** Best U (k = 2) of a laboratory at a nominal, g; null outside its scope. */
export function bestCapabilityOf(laboratory: string, quantity: Quantity, nominal: string): number | null {
  const range = (SCOPES.get(laboratory) ?? []).find(
    (line) =>
      line.quantity === quantity &&
      Number(line.from) <= Number(nominal) &&
      Number(nominal) <= Number(line.to),
  );
  if (!range) return null;
  return new Decimal(range.relative).times(nominal).plus(range.constant).toNumber();
}

/** A scope that rested for some months, and was restored. */
export const SUSPENSION = { laboratory: 'HM', from: '2021-02-01', to: '2021-07-31' } as const;

/** Whether a laboratory's scope rests on some day of a period. */
export function isSuspended(laboratory: string, first: string, last: string): boolean {
  return laboratory === SUSPENSION.laboratory && first <= SUSPENSION.to && last >= SUSPENSION.from;
}
