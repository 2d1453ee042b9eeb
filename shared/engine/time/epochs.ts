import { EngineError } from '../errors.ts';
import { item } from '../linear/entries.ts';
import { dayNumber } from './calendar.ts';

/**
 * What ended one epoch of a standard and began the next: adjustment, repair, damage. Where the moment is not
 * known it lies between the last date known to be good and the first known to be bad; otherwise both agree.
 */
export type Intervention = { lastGood: string; firstBad: string };

/** A dated entry; on the very day of an intervention its condition tells the side. */
export type Dated = { date: string; condition?: 'as-found' | 'as-left' };

/** Entries of each epoch, and those that cannot be assigned to one. */
export type EpochSplit<T> = { epochs: T[][]; undetermined: T[] };

/**
 * Splits a history at its interventions: no drift fit and no reference value crosses an epoch. An entry on the
 * last good day belongs before, one on the first bad day after, one in between to neither; where both are the
 * same day, as-found is before and as-left after, and without a condition it is undetermined.
 * Epochs come in the order of time, one more than interventions, and may be empty.
 * Source: as-found and as-left as in ISO/IEC 17025:2017, 7.8.4.1 d (from memory); the rest is a definition of our own.
 * @throws EngineError `not-a-date`, `backwards` when lastGood is after firstBad, `overlapping-interventions`
 */
export function splitByEpochs<T extends Dated>(
  history: readonly T[],
  interventions: readonly Intervention[],
): EpochSplit<T> {
  const bounds = checkInterventions(interventions);
  const epochs: T[][] = Array.from({ length: bounds.length + 1 }, () => []);
  const undetermined: T[] = [];
  history.forEach((entry, i) => {
    const day = dayNumber(entry.date, `history[${i}].date`);
    const sides = bounds.map((bound) => sideOf(day, entry.condition, bound));
    if (sides.includes('unknown')) undetermined.push(entry);
    else item(epochs, sides.filter((side) => side === 'after').length).push(entry);
  });
  return { epochs, undetermined };
}

/** The first intervention with entries on both sides of it, or with one that may be on either. */
export function crossedIntervention(
  history: readonly Dated[],
  interventions: readonly Intervention[],
): Intervention | undefined {
  return [...interventions].find((intervention) => {
    const { epochs, undetermined } = splitByEpochs(history, [intervention]);
    return undetermined.length > 0 || epochs.every((epoch) => epoch.length > 0);
  });
}

type Bounds = { lastGood: number; firstBad: number };

function checkInterventions(interventions: readonly Intervention[]): Bounds[] {
  const bounds = interventions.map((intervention, i) => {
    const lastGood = dayNumber(intervention.lastGood, `interventions[${i}].lastGood`);
    const firstBad = dayNumber(intervention.firstBad, `interventions[${i}].firstBad`);
    if (lastGood > firstBad) {
      throw new EngineError(
        'backwards',
        `interventions[${i}]`,
        `${intervention.lastGood} to ${intervention.firstBad}`,
        'The last good day is not to be after the first bad one.',
      );
    }
    return { lastGood, firstBad };
  });
  const ordered = bounds.sort((a, b) => a.lastGood - b.lastGood);
  ordered.slice(1).forEach((bound, i) => {
    if (bound.lastGood < item(ordered, i).firstBad) {
      throw new EngineError(
        'overlapping-interventions',
        'interventions',
        'two that overlap in time',
        'Join them to one.',
      );
    }
  });
  return ordered;
}

function sideOf(day: number, condition: Dated['condition'], bound: Bounds): 'before' | 'after' | 'unknown' {
  if (bound.lastGood === bound.firstBad && day === bound.lastGood) {
    if (condition === undefined) return 'unknown';
    return condition === 'as-found' ? 'before' : 'after';
  }
  if (day <= bound.lastGood) return 'before';
  return day >= bound.firstBad ? 'after' : 'unknown';
}
