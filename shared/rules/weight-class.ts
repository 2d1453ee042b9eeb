import { Decimal } from '#shared/decimal.ts';
import type { WeightClass } from '#shared/contracts/common.ts';
import type { ValueFacts } from './facts.ts';

/** The class a weight is judged by: the one its certificate states, else the one claimed for it; null: neither. */
export function classOf({ class: stated, weight }: Pick<ValueFacts, 'class' | 'weight'>): WeightClass | null {
  return stated ?? weight.classClaimed;
}

/** Whether this is a piece of metal, and not a realization or an agreed value. */
export function isArtefact({ weight }: Pick<ValueFacts, 'weight'>): boolean {
  return weight.kind !== 'realization' && weight.kind !== 'consensus value';
}

/** A nominal value for reading: "1 kg", "200 g", "5 mg". */
export function nominalText(nominal: string): string {
  const grams = new Decimal(nominal);
  if (grams.gte(1000)) return `${grams.div(1000).toFixed()}\u2009kg`;
  return grams.gte(1) ? `${grams.toFixed()}\u2009g` : `${grams.times(1000).toFixed()}\u2009mg`;
}
