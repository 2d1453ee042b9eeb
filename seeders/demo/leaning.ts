import { classLimitOf, CONVENTIONAL_AIR, volumeUncertainty, type Quantity, type Weight } from './weight.ts';
import { combined, covarianceOf, effect, type Effects, type WeightedEffects } from './effects.ts';
import { trueValue } from './weight.ts';
import type { DemoValue } from './value.ts';

/** A reference as a result uses it. */
export interface Use {
  value: DemoValue;
  sensitivity: number;
  usedAs: 'certificate' | 'class limit';
}

/** A shared effect that a result leans on. */
export interface SourceUse {
  /** `V:<registry number>` or `S:<scale>`. */
  source: string;
  /** g per unit of the source. */
  sensitivity: number;
  /** Standard uncertainty of the source, in its unit. */
  u: number;
  /** What the source really is off by, in its unit. */
  error: number;
}

/** What a result leans on. */
export interface Leaning {
  uses: readonly Use[];
  sources: readonly SourceUse[];
}

/**
 * The volumes that a weighing in air of some density brings in: the weight's own with +, its references' with -;
 * between conventional masses only the distance of the air density from 1.2 kg/m3 counts (OIML D 28).
 * @param air g/cm3
 */
export function buoyancy(weight: Weight, quantity: Quantity, uses: readonly Use[], air: number): SourceUse[] {
  const own = quantity === 'mass' ? air : air - CONVENTIONAL_AIR;
  const bySource = new Map<string, SourceUse>();
  const add = (of: Weight, sensitivity: number) => {
    if (!of.density) return;
    const source = `V:${of.registryNo}`;
    const before = bySource.get(source)?.sensitivity ?? 0;
    bySource.set(source, {
      source,
      sensitivity: before + sensitivity,
      u: volumeUncertainty(of),
      error: of.volumeError,
    });
  };
  add(weight, own);
  for (const { value, sensitivity, usedAs } of uses) {
    if (usedAs === 'class limit') continue;
    add(value.weight, -sensitivity * (value.quantity === 'mass' ? air : own));
  }
  return [...bySource.values()];
}

/** Standard uncertainty of a reference as used, g. */
export function uAsUsed({ value, usedAs }: Use): number {
  return usedAs === 'class limit'
    ? classLimitOf(value.weight.class, value.weight.nominal) / Math.sqrt(3)
    : value.u;
}

/** The effects that a result takes over from what it leans on. */
export function leanedEffects({ uses, sources }: Leaning, own: string): Effects {
  return combined([
    ...uses.map((use, at) => useEffects(use, `${own}/limit${at}`)),
    ...sources.map(sourceEffects),
  ]);
}

/** Variance that what a result leans on brings with it, with covariance; g2. */
export function carriedVariance(leaning: Leaning): number {
  const effects = leanedEffects(leaning, 'own');
  return covarianceOf(effects, effects);
}

/** The same as a certificate tells it: each reference with its printed u, which rounding has moved; g2. */
export function carriedAsPrinted({ uses, sources }: Leaning): number {
  const parts = [
    ...uses.map((use, at) => ({ ...useEffects(use, `limit${at}`), u: uAsUsed(use) })),
    ...sources.map((source) => ({ ...sourceEffects(source), u: source.u })),
  ];
  let sum = 0;
  for (const [i, one] of parts.entries()) {
    sum += (one.sensitivity * one.u) ** 2;
    for (const other of parts.slice(i + 1)) {
      sum += 2 * one.sensitivity * other.sensitivity * covarianceOf(one.effects, other.effects);
    }
  }
  return Math.max(0, sum);
}

/** What all that a result leans on is really off by on a day, g. */
export function leanedError({ uses, sources }: Leaning, day: string): number {
  const references = uses.reduce((sum, { value, sensitivity, usedAs }) => {
    const used = usedAs === 'class limit' ? 0 : value.deviation;
    return sum + sensitivity * (used - trueValue(value.weight, value.quantity, day));
  }, 0);
  return sources.reduce((sum, source) => sum + source.sensitivity * source.error, references);
}

function useEffects(use: Use, limit: string): WeightedEffects {
  const { value, sensitivity, usedAs } = use;
  return { sensitivity, effects: usedAs === 'class limit' ? effect(limit, uAsUsed(use)) : value.effects };
}

function sourceEffects({ source, sensitivity, u }: SourceUse): WeightedEffects {
  return { sensitivity, effects: effect(source, u) };
}
