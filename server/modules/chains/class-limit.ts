import { Decimal } from '#shared/decimal.ts';
import { maximumPermissibleError } from '#shared/engine/conformity/maximum-permissible-error.ts';
import type { StoredLink, StoredValue } from './stored.ts';

const MILLIGRAMS_PER_GRAM = 1000;

/**
 * How far from nominal (g) a reference used by its class limit may be: as fixed on the link at issue (a rectangular
 * distribution, u = limit / sqrt 3), else the class's maximum permissible error. Null: neither is on record.
 */
export function classLimitOf(parent: StoredValue, link: StoredLink): Decimal | null {
  if (link.usedExpandedU !== null) {
    return new Decimal(link.usedExpandedU).div(link.usedK ?? Math.sqrt(3)).times(Math.sqrt(3));
  }
  if (parent.class === null) return null;
  const limit = maximumPermissibleError(
    parent.class as Parameters<typeof maximumPermissibleError>[0],
    new Decimal(parent.nominal),
  );
  return limit && limit.div(MILLIGRAMS_PER_GRAM);
}
