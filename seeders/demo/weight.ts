import { Decimal } from '#shared/decimal.ts';
import type { WeightClass } from '#shared/contracts/common.ts';
import { maximumPermissibleError } from '#shared/engine/conformity/maximum-permissible-error.ts';
import { cutNormal, drawsFor } from './draws.ts';
import { drawTruth, trueDeviation, type Truth } from './truth.ts';
import type { DemoValue } from './value.ts';

/** The two kinds of mass; they are never mixed. */
export type Quantity = 'mass' | 'conventional mass';

/** A density as the register holds it, kg/m3, k = 2. */
export interface DemoDensity {
  value: string;
  expandedU: string;
  origin: 'measured' | 'assumed' | 'manufacturer';
}

/** A standard of the demo network: what the register knows of it, and what nobody knows. */
export interface Weight {
  registryNo: string;
  owner: string;
  kind: 'weight' | 'prototype' | 'realization' | 'consensus value' | 'silicon sphere';
  /** g. */
  nominal: string;
  grams: number;
  /** Nominal as marked, with a star on the second of two: `200 g *`. */
  marking: string;
  class: WeightClass | null;
  shape: 'knob' | 'cylinder' | 'sphere' | 'sheet' | 'wire' | 'block' | 'other';
  material: string;
  serial: string | null;
  density: DemoDensity | null;
  inServiceFrom: string;
  intervalMonths: number | null;
  truth: Truth;
  /** Volume on record minus true volume, cm3. */
  volumeError: number;
  /** Days on which epochs begin; the first is the day of coming into service. */
  epochs: string[];
  /** Oldest first. */
  values: DemoValue[];
  /** Last day on which it served as reference. */
  lastUsedOn: string;
}

/** What is said of a weight when it is made; the rest is drawn or follows. */
export type WeightDescription = Pick<Weight, 'registryNo' | 'owner' | 'nominal' | 'inServiceFrom'> &
  Partial<Pick<Weight, 'kind' | 'class' | 'marking' | 'shape' | 'material' | 'serial' | 'density'>> & {
    intervalMonths?: number | null;
    /** True deviation at the turn of 2016 in multiples of the class limit; drawn where left out. */
    startShare?: number;
    /** For standards without class: what stands for the class limit, g. */
    limit?: number;
  };

/** Air density of the convention, g/cm3 (OIML D 28: 1.2 kg/m3). */
export const CONVENTIONAL_AIR = 0.0012;

/** Makes a weight and draws what nobody knows of it. */
export function makeWeight(description: WeightDescription): Weight {
  const draws = drawsFor(description.registryNo);
  const { nominal, density = null, limit, startShare, ...rest } = description;
  const weightClass = description.class ?? null;
  const mpe = limit ?? classLimitOf(weightClass, nominal);
  const share = startShare ?? 0.27 * cutNormal(draws, 1.9);
  const weight: Weight = {
    kind: 'weight',
    marking: markingOf(nominal),
    shape: shapeOf(nominal),
    material: 'stainless steel',
    serial: null,
    intervalMonths: null,
    ...rest,
    class: weightClass,
    nominal,
    grams: Number(nominal),
    density,
    truth: drawTruth(draws, weightClass ?? 'E1', mpe, share * mpe),
    volumeError: 0,
    epochs: [description.inServiceFrom],
    values: [],
    lastUsedOn: '',
  };
  weight.volumeError = volumeUncertainty(weight) * cutNormal(draws, 1.5);
  return weight;
}

/** Maximum permissible error, g; 0 without class or where the class has none. */
export function classLimitOf(weightClass: WeightClass | null, nominal: string): number {
  const limit = weightClass && maximumPermissibleError(weightClass, new Decimal(nominal));
  return limit ? limit.toNumber() / 1000 : 0;
}

/** Volume on record, cm3; 0 where no density is. */
export function volumeOf({ grams, density }: Pick<Weight, 'grams' | 'density'>): number {
  return density ? (1000 * grams) / Number(density.value) : 0;
}

/** Standard uncertainty of the volume on record, cm3: V u(rho)/rho. */
export function volumeUncertainty(weight: Pick<Weight, 'grams' | 'density'>): number {
  if (!weight.density) return 0;
  return (volumeOf(weight) * Number(weight.density.expandedU)) / 2 / Number(weight.density.value);
}

/** True deviation of a kind on a day, g. Mass = conventional mass (1 - 1.2/8000) + 1.2 kg/m3 x volume (OIML D 28). */
export function trueValue(weight: Weight, quantity: Quantity, day: string): number {
  const conventional = trueDeviation(weight.truth, day);
  if (quantity === 'conventional mass' || !weight.density) return conventional;
  const volume = volumeOf(weight) - weight.volumeError;
  return conventional + CONVENTIONAL_AIR * volume - (1.2 / 8000) * (weight.grams + conventional);
}

/** `200 mg`, `1 kg`. */
export function markingOf(nominal: string): string {
  const grams = new Decimal(nominal);
  if (grams.gte(1000)) return `${grams.div(1000).toFixed()} kg`;
  return grams.lt(1) ? `${grams.times(1000).toFixed()} mg` : `${grams.toFixed()} g`;
}

/** Wire and sheet below 1 g, so that the pieces of one decade differ in shape (OIML R 111-1:2004, 6). */
function shapeOf(nominal: string): Weight['shape'] {
  if (Number(nominal) >= 1) return 'knob';
  return nominal.endsWith('2') ? 'sheet' : 'wire';
}
