/**
 * What a value's error is made of: independent effects (a volume, a day at the balance, a scale), each with the
 * grams that one standard deviation of it contributes. Covariances follow by multiplying; nothing else keeps them.
 */
export type Effects = ReadonlyMap<string, number>;

/** Something as a part of a sum: its effects, and how strongly it counts. */
export interface WeightedEffects {
  sensitivity: number;
  effects: Effects;
}

/** The effects of a sum of things. */
export function combined(parts: readonly WeightedEffects[]): Effects {
  const sum = new Map<string, number>();
  for (const { sensitivity, effects } of parts) {
    for (const [effect, grams] of effects) sum.set(effect, (sum.get(effect) ?? 0) + sensitivity * grams);
  }
  return sum;
}

/** A single effect. */
export function effect(name: string, grams: number): Effects {
  return new Map([[name, grams]]);
}

/** Covariance of two things, g2; of a thing with itself its variance. */
export function covarianceOf(a: Effects, b: Effects): number {
  const [few, many] = a.size < b.size ? [a, b] : [b, a];
  let sum = 0;
  for (const [name, grams] of few) sum += grams * (many.get(name) ?? 0);
  return sum;
}
