import type { Question } from '#shared/rules/facts.ts';
import { certificateText } from '#shared/rules/numbers.ts';
import { endOfDay } from '#shared/state-at.ts';
import type { StandardDossier, StoredEnd, StoredHistoryValue, StoredValue } from './stored.ts';

/** What became of a value: it stands, another took its place, or it is lost, and why. */
export type Fate =
  { kind: 'stands' } | { kind: 'replaced'; byId: number } | { kind: 'lost'; because: string };

const STANDS: Fate = { kind: 'stands' };

/**
 * Follows a value through its successors, by the ends that are in force on the day as known on the knowledge day. A
 * successor holds from the day on which the end takes effect, even where it was issued later. A mistaken withdrawal
 * is mended by a new revision: a successor speaks louder than a withdrawal.
 * @param dossier of the value's own standard
 */
export function fateOf(value: StoredValue, dossier: StandardDossier, question: Question): Fate {
  let current = dossier.history.find((row) => row.id === value.id);
  for (let steps = 0; current && steps <= dossier.history.length; steps += 1) {
    const ends = standingEnds(current.ends, question);
    if (ends.length === 0) return current.id === value.id ? STANDS : { kind: 'replaced', byId: current.id };
    const next = lastReplacement(ends);
    if (!next) return lost(current, dossier, ends);
    const successor = dossier.history.find((row) => row.id === next.replacedById);
    if (!successor || !isSameThing(current, successor)) return otherThing(current, dossier);
    current = successor;
  }
  return STANDS;
}

function standingEnds(ends: readonly StoredEnd[], { day, known }: Question): StoredEnd[] {
  return ends.filter((end) => end.effectiveOn <= day && end.recordedAt <= endOfDay(known));
}

function lastReplacement(ends: readonly StoredEnd[]): StoredEnd | undefined {
  return ends
    .filter((end) => end.replacedById !== null)
    .sort((a, b) => (a.recordedAt < b.recordedAt ? -1 : 1))
    .at(-1);
}

function isSameThing(one: StoredHistoryValue, other: StoredHistoryValue): boolean {
  return one.quantity === other.quantity && one.medium === other.medium;
}

function lost(row: StoredHistoryValue, { registryNo }: StandardDossier, ends: StoredEnd[]): Fate {
  const since = ends.map((end) => end.effectiveOn).sort()[0];
  return {
    kind: 'lost',
    because: `certificate ${certificateText(row)} for ${registryNo} was withdrawn on ${since}, and nothing has taken its place`,
  };
}

function otherThing(row: StoredHistoryValue, { registryNo }: StandardDossier): Fate {
  return {
    kind: 'lost',
    because: `what took the place of certificate ${certificateText(row)} for ${registryNo} is a result of another weight or kind`,
  };
}
