import { WEIGHTS_OF_OTHERS_BEYOND } from '#shared/contracts/downstream.ts';
import { wordOf, type Consequence } from './what-if-word.ts';

/** A change so far as the word for a weight of others looks at it: grams, from weak to strong. */
export interface Band {
  from: number;
  to: number;
}

const STEPS = [1, 2, 5, 10] as const;
/** Relative noise of doubles beside a step. */
const NOISE = 1e-9;
const NOTHING: Band = { from: 0, to: 0 };

/**
 * The band of a change of this size: from one of 1, 2, 5, 10, ... to the next, the upper one included. Its sign is
 * kept; what cannot be computed stays so.
 */
export function bandOf(size: number): Band {
  const magnitude = Math.abs(size);
  if (magnitude === 0) return NOTHING;
  if (Number.isNaN(magnitude)) return { from: NaN, to: NaN };
  const power = Math.floor(Math.log10(magnitude) + NOISE);
  const step = (place: number) => STEPS[place]! * 10 ** power;
  const upper = STEPS.findIndex((_, place) => step(place) >= magnitude * (1 - NOISE));
  const from = upper === 0 ? step(2) / 10 : step(upper - 1);
  return { from: Math.sign(size) * from, to: Math.sign(size) * step(upper) };
}

/**
 * The word for a weight of others: the strongest that any change of the same band could bring, at a threshold that
 * nobody chooses. So it is never weaker than the true one, and trying changes tells U and value no closer than a band.
 * A class is lost first at the far end of the band, and gained first where the band comes nearest to making up for
 * the value's deviation.
 * @param change grams
 * @param at what a shift and an added variance bring to the value
 */
export function wordOfOthers(
  change: { shift: number; addedU: number; deviation: number },
  at: (shift: number, addedVariance: number) => Consequence,
): number {
  const shift = bandOf(change.shift);
  const added = bandOf(change.addedU);
  const [low, high] = shift.from < shift.to ? [shift.from, shift.to] : [shift.to, shift.from];
  const nearest = Math.min(Math.max(-change.deviation, low), high);
  const words = [
    wordOf(at(shift.to, added.to ** 2), WEIGHTS_OF_OTHERS_BEYOND),
    wordOf(at(nearest, added.from ** 2), WEIGHTS_OF_OTHERS_BEYOND),
  ];
  return Math.max(...words);
}
