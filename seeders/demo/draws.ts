import { randomSource, type RandomSource } from '#shared/engine/uncertainty/random.ts';

/** Changing it makes another network of the same kind. */
const SEED = 20_190_520;

/**
 * A stream of pseudo-random numbers of its own for one subject (a weight, a certificate), so that adding one
 * weight does not change all others.
 */
export function drawsFor(subject: string): RandomSource {
  // FNV-1a: spreads short texts over 32 bits.
  let hash = 0x811c9dc5;
  for (const letter of `${SEED} ${subject}`) hash = Math.imul(hash ^ letter.codePointAt(0)!, 0x01000193);
  return randomSource(hash >>> 0);
}

/** A normal number cut to +/- `limit` standard deviations: the network has no freak measurements of its own. */
export function cutNormal(draws: RandomSource, limit: number): number {
  const drawn = draws.normal();
  return Math.abs(drawn) <= limit ? drawn : cutNormal(draws, limit);
}

/** A number between two bounds. */
export function between(draws: RandomSource, from: number, to: number): number {
  return from + (to - from) * draws.uniform();
}

/** A whole number from `from` to `to`, both included. */
export function wholeBetween(draws: RandomSource, from: number, to: number): number {
  return from + Math.floor((to - from + 1) * draws.uniform());
}
