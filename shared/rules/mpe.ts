import { Decimal } from '#shared/decimal.ts';
import { maximumPermissibleError } from '#shared/engine/conformity/maximum-permissible-error.ts';
import type { ValueFacts } from './facts.ts';

/** The maximum permissible error of the class stated for a value, g; null without class or where it has none. */
export function mpeOf(value: Pick<ValueFacts, 'class' | 'nominal'>): Decimal | null {
  if (value.class === null) return null;
  return maximumPermissibleError(value.class, new Decimal(value.nominal))?.times('0.001') ?? null;
}
