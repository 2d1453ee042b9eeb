import type { ValueFacts } from './facts.ts';
import type { PropertyFacts } from './weight-facts.ts';

/** A density with its U (k = 2) in kg/m3; U null where it is not stated. */
export interface DensityOnRecord {
  value: number;
  expandedU: number | null;
  origin: PropertyFacts['origin'];
  from: 'density' | 'volume';
}

/** The density on record for a weight, from its volume where only that is; null: neither. */
export function densityOnRecord({
  density,
  weight,
  nominal,
}: Pick<ValueFacts, 'density' | 'weight' | 'nominal'>): DensityOnRecord | null {
  if (density) {
    const { origin } = density;
    return { value: Number(density.value), expandedU: atTwo(density), origin, from: 'density' };
  }
  if (!weight.volume) return null;
  const volume = Number(weight.volume.value);
  // g/cm3 to kg/m3; the weight's own mass adds nothing to u at this level.
  const value = (1000 * Number(nominal)) / volume;
  const expandedU = atTwo(weight.volume);
  return {
    value,
    expandedU: expandedU === null ? null : (value * expandedU) / volume,
    origin: weight.volume.origin,
    from: 'volume',
  };
}

/** Expanded uncertainty at k = 2; null where U or k is not stated. */
export function atTwo({ expandedU, k }: Pick<PropertyFacts, 'expandedU' | 'k'>): number | null {
  return expandedU === null || k === null ? null : (2 * Number(expandedU)) / Number(k);
}

/** Who says it, for reading. */
export const ORIGIN_TEXT = {
  measured: 'measured',
  assumed: 'assumed',
  manufacturer: 'given by the manufacturer',
} as const;
